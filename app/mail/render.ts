export interface MailBody {
  readonly bodyText: string;
  readonly bodyHtml: string;
}

export interface MailParts {
  readonly heading: string;
  /** Paragraphs of plain text. */
  readonly lines: readonly string[];
  readonly link?: { readonly href: string; readonly words: string };
}

const escapeHtml = (text: string): string =>
  text.replace(/[&<>"']/gu, (sign) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;', "'": '&#39;' })[sign] ?? sign);

const foot = 'Scorchline writes to people with an account or a part in a case. It never asks for a password by mail.';

/** One plain letter in text and HTML; the HTML loads nothing from anywhere. */
export function mail({ heading, lines, link }: MailParts): MailBody {
  const bodyText = [heading, '', ...lines.flatMap((line) => [line, '']), ...(link ? [`${link.words}: ${link.href}`, ''] : []), foot].join('\n');
  const paragraphs = lines.map((line) => `<p style="margin:0 0 12px">${escapeHtml(line)}</p>`).join('');
  const anchor = link ? `<p style="margin:0 0 12px"><a href="${escapeHtml(link.href)}" style="color:#b5471b">${escapeHtml(link.words)}</a></p>` : '';
  const bodyHtml = `<!doctype html><html lang="en"><body style="margin:0;padding:24px;background:#f6f1e7;color:#1c2430;font:16px/1.45 sans-serif"><h1 style="margin:0 0 16px;font:600 20px/1.3 serif">${escapeHtml(heading)}</h1>${paragraphs}${anchor}<p style="margin:24px 0 0;font-size:13px">${escapeHtml(foot)}</p></body></html>`;
  return { bodyText, bodyHtml };
}
