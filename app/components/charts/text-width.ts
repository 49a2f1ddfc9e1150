/*
 * Advance widths of Noto Sans 400 in hundredths of the type size, so that labels can be placed on the server without
 * measuring. Read from the font file that the product ships.
 */
const widthClasses: readonly (readonly [number, string])[] = [
  [22, "'’"], [26, ' ijl'], [27, '!,.:;J·'], [30, '()'], [33, '[]-'], [34, 'If²³'], [36, 't'], [37, '/\\'], [38, '{}'],
  [41, '"r'], [43, '?°'], [47, 'z_'], [48, 'cs'], [50, 'vy–'], [52, 'FLkx'], [55, '*S|'], [56, 'ETae'],
  [57, '$+0123456789<=>YZ^~±×'], [60, 'PVoX'], [61, 'bdgpq'], [62, 'KRhnu'], [64, 'CA'], [65, '#B'], [73, '&DGU'],
  [76, 'HN'], [79, 'OQw'], [83, '%'], [91, 'M@'], [93, 'Wm'],
];
const widthOf = new Map(widthClasses.flatMap(([width, letters]) => [...letters].map((letter): [string, number] => [letter, width])));

/** Weight 600 runs about this much wider than 400 over ordinary words. */
const boldFactor = 1.06;

/** Width of a line of Noto Sans. [px] */
export function textWidthPx(text: string, sizePx: number, bold = false): number {
  let hundredths = 0;
  for (const letter of text) hundredths += widthOf.get(letter) ?? 62;
  return (hundredths / 100) * sizePx * (bold ? boldFactor : 1);
}
