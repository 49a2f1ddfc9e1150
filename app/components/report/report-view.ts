import type { PhotoExif, PhotoExifAnswer } from '#app/domain/photo.ts';
import type { PhotoView } from '#app/domain/incident.ts';
import type { SiteChoice } from './where-question.tsx';

/** A photo of this report that the team already has. */
export interface StoredPhoto {
  readonly id: string;
  readonly fileName: string;
  readonly bytes: number;
  readonly state: 'stored' | 'ready' | 'failed';
  readonly exif: PhotoExif;
  readonly exifAnswer: PhotoExifAnswer;
  readonly view: PhotoView | null;
  readonly caption: string;
  readonly clockErrorS: number;
  readonly madeSmaller: boolean;
}

/** Everything the page of a report under way needs. */
export interface ReportView {
  /** The page as a phone keeps it for a start without a connection: it holds nobody's data and asks the device. */
  readonly shell?: true;
  /** What the device knew, without the team's side: photos that are there only are not listed. */
  readonly fromDevice?: true;
  /** Made with the first look at the page; the same report keeps it until it is sent. */
  readonly clientId: string;
  /** Names the place on the device where this holder's reports lie. */
  readonly holderKey: string;
  readonly guestCode: string | null;
  /** Without an account: one site, and a way to be reached is asked for. */
  readonly guest: boolean;
  readonly sites: readonly SiteChoice[];
  readonly emergencyNumber: string;
  readonly photos: readonly StoredPhoto[];
  /** Larger files are refused, which is said before they are sent. */
  readonly photoMaxBytes: number;
  readonly closeHref: string;
}
