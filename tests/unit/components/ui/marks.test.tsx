import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, it } from 'vitest';
import { caseStateLabels, caseStates } from '#app/domain/case-state.ts';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { Hatch } from '#app/components/ui/hatch.tsx';
import { StateMark } from '#app/components/ui/state-mark.tsx';
import { TestMark } from '#app/components/ui/test-mark.tsx';

const words = (html: string) => html.replace(/<[^>]+>/g, '');

describe('StateMark', () => {
  it('gives every state its own shape and always the word of the case workflow', () => {
    const drawn = caseStates.map((state) => renderToStaticMarkup(<StateMark state={state} />));
    for (const [index, state] of caseStates.entries()) expect(words(drawn[index] ?? '')).toBe(caseStateLabels[state]);
    expect(new Set(drawn.map((html) => /<svg.*<\/svg>/s.exec(html)?.[0])).size).toBe(caseStates.length);
  });
});

describe('TestMark', () => {
  it('says the result in words even when the name of the test stands in its place', () => {
    expect(words(renderToStaticMarkup(<TestMark result="inconclusive" label="Weather" />))).toBe('Weather: inconclusive');
  });
});

describe('Hatch', () => {
  it('has one width a class, so that it never tells how much was withheld', () => {
    const widths = (['personal', 'health', 'child', 'legal', 'exact place'] as const).map((one) => / w-\[[^\]]+\]/.exec(renderToStaticMarkup(<Hatch withheld={one} />))?.[0]);
    expect(widths).not.toContain(undefined);
    expect(words(renderToStaticMarkup(<Hatch withheld="exact place" />))).toBe('withheld: exact place');
  });
});

describe('Button', () => {
  it('submits unless told otherwise, and a link stays a link outside a router', () => {
    expect(renderToStaticMarkup(<Button>Save</Button>)).toContain('type="submit"');
    expect(renderToStaticMarkup(<ButtonLink href="/report">Report a mark</ButtonLink>)).toMatch(/^<a href="\/report"/);
  });
});
