import type { Sighting } from './incident.ts';
import { receiptPattern } from './incident.ts';
import type { Report } from './report.ts';

const sightingTitles: Record<Sighting, string> = {
  mark: 'Mark or scorch',
  melted: 'Melted or bent',
  'bright-patch': 'Bright patch',
  'smoke-or-fire': 'Smoke or fire, now out',
  'dont-know': 'Something seen',
};
const titleLength = 90;

/**
 * Title of a new case: what was seen and where, in the reporter's words for the place. Falls back to the site's name when
 * those words contain a name that the report knows, or something that looks like an address or a number to call.
 *
 * @param names of people that must not appear in a title.
 */
export function titleOfReport(report: Pick<Report, 'sighting' | 'placeDetail' | 'site'>, names: readonly string[]): string {
  const words = (report.placeDetail.split(/[\n.;]/u)[0] ?? '').trim();
  const folded = words.toLowerCase();
  const parts = names.flatMap((name) => name.toLowerCase().split(/[\s,]+/u)).filter((part) => part.length > 2);
  const personal = parts.some((part) => folded.includes(part)) || /@|\d{5,}|\b(?:mrs?|ms|miss|mx|dr)\b/iu.test(words);
  const where = words === '' || personal ? report.site.name : words;
  const title = `${sightingTitles[report.sighting]}, ${where}`;
  return title.length <= titleLength ? title : `${title.slice(0, titleLength - 1).trimEnd()}…`;
}

const receiptLetters = 'ABCDEFGHJKLMNPQRSTUVWXYZ23456789';

/** A receipt from eight random numbers below 32. Without I, O, 0 and 1 it survives being read out. */
export function receiptFrom(numbers: Uint8Array): string {
  const text = [...numbers.subarray(0, 8)].map((number) => receiptLetters[number % 32] ?? '').join('');
  return `${text.slice(0, 2)}-${text.slice(2, 6)}-${text.slice(6, 8)}`;
}

/** A receipt as somebody may type it: small letters, spaces or missing dashes are mended; null when it cannot be one. */
export function readReceipt(text: string): string | null {
  const bare = text.toUpperCase().replace(/[^A-Z0-9]/gu, '');
  const receipt = `${bare.slice(0, 2)}-${bare.slice(2, 6)}-${bare.slice(6)}`;
  return receiptPattern.test(receipt) ? receipt : null;
}
