import { getDocument, VerbosityLevel } from 'pdfjs-dist/legacy/build/pdf.mjs';

/**
 * Every word that can be read out of a PDF: the text of its pages, its title and the other words of its description, and
 * the alternative texts of its figures. Lines are joined by blanks, so that a name broken over two lines is still found.
 * Empty for bytes that are no PDF.
 */
export async function pdfText(bytes: Uint8Array): Promise<string> {
  const task = getDocument({ data: new Uint8Array(bytes), verbosity: VerbosityLevel.ERRORS, isEvalSupported: false, useSystemFonts: false });
  try {
    const pdf = await task.promise;
    const { info } = await pdf.getMetadata();
    const parts: string[] = [JSON.stringify(info)];
    for (let number = 1; number <= pdf.numPages; number += 1) {
      const page = await pdf.getPage(number);
      const { items } = await page.getTextContent();
      parts.push(items.map((item) => ('str' in item ? `${item.str}${item.hasEOL ? ' ' : ''}` : '')).join(''));
      parts.push(alternatives(await page.getStructTree()));
    }
    return parts.join('\n');
  } catch (error) {
    if (error instanceof Error && error.name === 'InvalidPDFException') return '';
    throw error;
  } finally {
    await task.destroy();
  }
}

function alternatives(node: unknown): string {
  if (typeof node !== 'object' || node === null) return '';
  const own = 'alt' in node && typeof node.alt === 'string' ? [node.alt] : [];
  const below = 'children' in node && Array.isArray(node.children) ? node.children.map(alternatives) : [];
  return [...own, ...below].filter((text) => text !== '').join('\n');
}
