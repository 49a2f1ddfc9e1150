/** A figure with as many digits as it deserves: whole above 100, one decimal above 10, three significant below. */
export function plainNumber(value: number): string {
  if (!Number.isFinite(value)) return 'not known';
  const size = Math.abs(value);
  if (size >= 100) return Math.round(value).toString();
  if (size >= 10) return trimmed(value.toFixed(1));
  return size === 0 ? '0' : trimmed(value.toPrecision(size >= 1 ? 3 : 2));
}

function trimmed(text: string): string {
  return text.includes('.') && !text.includes('e') ? text.replace(/\.?0+$/, '') : text;
}
