/** One value of a table that leaves as CSV: numbers are written as they are, text is made harmless to spreadsheets. */
export type CsvValue = string | number | null;

/**
 * A text cell that no spreadsheet takes for a formula: one that begins with = + - @, a tab or a carriage return is given
 * an apostrophe (OWASP, "CSV Injection", https://owasp.org/www-community/attacks/CSV_Injection).
 */
export function csvCell(value: CsvValue): string {
  if (value === null) return '';
  if (typeof value === 'number') return Number.isFinite(value) ? String(value) : '';
  const harmless = /^[\s\uFEFF]*[=+\-@\t\r\uFF1D\uFF0B\uFF0D\uFF20]/u.test(value) ? `'${value}` : value;
  return /[",\r\n;]/u.test(harmless) ? `"${harmless.replaceAll('"', '""')}"` : harmless;
}

/** CSV after RFC 4180: CRLF, quoted where needed, the head first. UTF-8 with a byte order mark, so that names survive. */
export function csvText(head: readonly string[], rows: readonly (readonly CsvValue[])[]): string {
  return `\uFEFF${[head, ...rows].map((row) => row.map(csvCell).join(',')).join('\r\n')}\r\n`;
}
