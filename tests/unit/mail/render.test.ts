import { describe, expect, test } from 'vitest';
import { mail } from '#app/mail/render.ts';

const parts = { heading: 'Case 118 & more', lines: ['<script>alert(1)</script>', 'Second "line"'], link: { href: 'https://register.example/cases/118?a=1&b=2', words: 'Open the case' } };

describe('a letter', () => {
  test('says the same in text and in HTML, with the address of the link written out in the text', () => {
    const { bodyText, bodyHtml } = mail(parts);
    for (const line of [parts.heading, ...parts.lines]) expect(bodyText).toContain(line);
    expect(bodyText).toContain(`Open the case: ${parts.link.href}`);
    expect(bodyHtml).toContain('Case 118 &amp; more');
    expect(bodyHtml).toContain('href="https://register.example/cases/118?a=1&amp;b=2"');
  });

  test('lets no words become markup', () => {
    expect(mail(parts).bodyHtml).not.toContain('<script');
    expect(mail({ ...parts, link: { href: 'https://register.example/"><img src=x>', words: '<b>' } }).bodyHtml).not.toMatch(/<img|<b>/u);
  });

  test('loads nothing from anywhere', () => {
    expect(mail(parts).bodyHtml).not.toMatch(/<(?:img|link|script|iframe)|url\(/u);
  });
});
