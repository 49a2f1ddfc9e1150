import { randomInt } from 'node:crypto';
import { deflateSync, crc32 } from 'node:zlib';
import sharp from 'sharp';

/** Picture files for tests, made anew so that no two tests share a hash. */
const ground = () => ({ r: randomInt(256), g: randomInt(256), b: randomInt(256) });

export async function plainJpeg(width = 640, height = 480): Promise<Buffer> {
  return sharp({ create: { width, height, channels: 3, background: ground(), noise: { type: 'gaussian', mean: 128, sigma: 40 } } }).jpeg({ quality: 90 }).toBuffer();
}

export interface CameraData {
  readonly orientation?: number;
  readonly takenAt?: string;
  readonly offset?: string;
}

/** A JPEG as a camera writes it: time, offset, a place near 53.5 N 1.6 W, direction 187° from true north. */
export async function cameraJpeg({ orientation = 1, takenAt = '2026:05:09 15:05:12', offset = '+01:00' }: CameraData = {}): Promise<Buffer> {
  return sharp(await plainJpeg(1200, 800))
    .withMetadata({ orientation })
    .withExifMerge({
      IFD0: { Make: 'None', Model: 'Box 1' },
      IFD2: { DateTimeOriginal: takenAt, OffsetTimeOriginal: offset },
      IFD3: { GPSLatitudeRef: 'N', GPSLatitude: '53/1 30/1 0/1', GPSLongitudeRef: 'W', GPSLongitude: '1/1 36/1 0/1', GPSImgDirectionRef: 'T', GPSImgDirection: '187/1' },
    })
    .jpeg()
    .toBuffer();
}

function chunk(type: string, data: Buffer): Buffer {
  const body = Buffer.concat([Buffer.from(type, 'latin1'), data]);
  const length = Buffer.alloc(4);
  length.writeUInt32BE(data.length);
  const sum = Buffer.alloc(4);
  sum.writeUInt32BE(crc32(body));
  return Buffer.concat([length, body, sum]);
}

/** A small file that unpacks to side × side pixels: one bit each, all alike. Layout: ISO/IEC 15948. */
export function pixelBomb(side: number): Buffer {
  const header = Buffer.alloc(13);
  header.writeUInt32BE(side, 0);
  header.writeUInt32BE(side, 4);
  header.set([1, 0, 0, 0, 0], 8);
  const row = Math.ceil(side / 8) + 1;
  return Buffer.concat([Buffer.from([0x89, 0x50, 0x4e, 0x47, 0x0d, 0x0a, 0x1a, 0x0a]), chunk('IHDR', header), chunk('IDAT', deflateSync(Buffer.alloc(row * side), { level: 9 })), chunk('IEND', Buffer.alloc(0))]);
}
