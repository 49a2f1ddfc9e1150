import QRCode from 'qrcode';
import { env } from '#app/env.server.ts';

/** A QR code (ISO/IEC 18004, level M) as one path of unit squares; `size` is its side in squares. */
export interface LabelCode {
  readonly url: string;
  readonly size: number;
  readonly path: string;
}

/** The code that leads from a printed label to the page at `path`. */
export function labelCode(path: string): LabelCode {
  const url = new URL(path, env.PUBLIC_URL).href;
  const { modules } = QRCode.create(url, { errorCorrectionLevel: 'M' });
  const squares: string[] = [];
  for (let row = 0; row < modules.size; row += 1) {
    for (let column = 0; column < modules.size; column += 1) if (modules.get(row, column)) squares.push(`M${column} ${row}h1v1h-1z`);
  }
  return { url, size: modules.size, path: squares.join('') };
}
