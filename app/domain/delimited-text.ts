/** Rows and cells of a table in text, quotes as in RFC 4180. Blank lines keep their place, so that line numbers hold. */
export function readDelimited(text: string, delimiter: string): string[][] {
  return text.replace(/^\uFEFF/u, '').split(/\r?\n/u).map((line) => cellsOf(line, delimiter));
}

function cellsOf(line: string, delimiter: string): string[] {
  const cells: string[] = [];
  let cell = '';
  let quoted = false;
  for (let at = 0; at < line.length; at += 1) {
    const sign = line[at] ?? '';
    if (sign === '"') {
      if (quoted && line[at + 1] === '"') {
        cell += '"';
        at += 1;
      } else quoted = !quoted;
    } else if (sign === delimiter && !quoted) {
      cells.push(cell.trim());
      cell = '';
    } else cell += sign;
  }
  return [...cells, cell.trim()];
}

export const delimiters = [',', ';', '\t'] as const;

/** The delimiter that parts the first lines into most columns. */
export function guessDelimiter(text: string): string {
  const lines = text.split(/\r?\n/u, 12).filter((line) => line.trim() !== '');
  const columns = (delimiter: string) => Math.max(0, ...lines.map((line) => cellsOf(line, delimiter).length));
  return [...delimiters].sort((a, b) => columns(b) - columns(a))[0] ?? ',';
}
