import type { PhotoView } from './incident.ts';
import { photoViewLabels } from './incident.ts';
import { formatDayClock, formatOffset } from './local-time.ts';
import type { PhotoMark } from './photo-marks.ts';
import type { PhotoExif, PhotoExifAnswer, PhotoMask } from './photo.ts';
import { exifInstant, minutesFromFinding } from './photo.ts';

/** What a photo row holds that its card is made of. */
export interface PhotoFacts {
  readonly id: string;
  readonly label: number | null;
  readonly state: 'stored' | 'ready' | 'failed';
  readonly sha256: string;
  readonly bytes: number;
  readonly widthPx: number;
  readonly heightPx: number;
  readonly view: PhotoView | null;
  readonly caption: string;
  readonly altText: string;
  readonly takenAt: Date | null;
  readonly clockErrorS: number;
  readonly exif: PhotoExif;
  readonly exifAnswer: PhotoExifAnswer;
  /** Made smaller on the device that sent it: not the camera's own file. */
  readonly madeSmaller: boolean;
  readonly masks: readonly PhotoMask[];
  readonly marks: readonly PhotoMark[];
  readonly releasable: 'undecided' | 'yes' | 'no';
  readonly hashCheck: 'same' | 'differs' | 'missing' | null;
  readonly hashCheckedAt: Date | null;
}
export interface PhotoCaseFacts {
  readonly zone: string;
  readonly foundAt: Date | null;
  readonly foundClockErrorS: number;
}

/** Something that the file says, put to the person. */
export interface PhotoOffer {
  readonly kind: 'time' | 'place';
  readonly says: string;
  readonly question: string;
  readonly answer: 'accepted' | 'declined' | null;
}

/** One photo of the sheet, in words. */
export interface PhotoCard {
  readonly id: string;
  readonly label: number;
  readonly state: PhotoFacts['state'];
  readonly viewWords: string;
  readonly caption: string;
  readonly altText: string;
  /** For the picture itself: what was typed, else what is known. */
  readonly alternative: string;
  readonly view: PhotoView | null;
  readonly clockErrorS: number;
  readonly timeWords: string;
  readonly offers: readonly PhotoOffer[];
  /** Said when photo and stated finding lie more than 30 minutes apart. */
  readonly differenceWords: string | null;
  readonly hashShort: string;
  readonly sha256: string;
  readonly hashCheck: PhotoFacts['hashCheck'];
  readonly hashWords: string;
  readonly sizeWords: string;
  readonly widthPx: number;
  readonly heightPx: number;
  readonly masks: readonly PhotoMask[];
  readonly marks: readonly PhotoMark[];
  readonly releasable: PhotoFacts['releasable'];
}

export function photoCard(photo: PhotoFacts, about: PhotoCaseFacts): PhotoCard {
  const label = photo.label ?? 0;
  const viewWords = photo.view ? photoViewLabels[photo.view] : 'View not stated';
  return {
    id: photo.id,
    label,
    state: photo.state,
    viewWords,
    caption: photo.caption,
    altText: photo.altText,
    alternative: photo.altText || photo.caption || `Photo ${label}, ${viewWords.toLowerCase()}`,
    view: photo.view,
    clockErrorS: photo.clockErrorS,
    timeWords: timeWords(photo, about.zone),
    offers: offersOf(photo, about.zone),
    differenceWords: differenceWords(photo, about),
    hashShort: `${photo.sha256.slice(0, 4)} ${photo.sha256.slice(4, 8)}`,
    sha256: photo.sha256,
    hashCheck: photo.hashCheck,
    hashWords: hashWords(photo, about.zone),
    sizeWords: `${photo.widthPx} by ${photo.heightPx} px, ${photo.bytes < 1_000_000 ? `${Math.ceil(photo.bytes / 1000)} kB` : `${(photo.bytes / 1_000_000).toFixed(1)} MB`}${photo.madeSmaller ? ', made smaller on the phone before it was sent' : ''}`,
    masks: photo.masks,
    marks: photo.marks,
    widthPx: photo.widthPx,
    heightPx: photo.heightPx,
    releasable: photo.releasable,
  };
}

function timeWords(photo: PhotoFacts, zone: string): string {
  if (!photo.takenAt) return 'time not stated';
  if (photo.clockErrorS === 0) return formatDayClock(photo.takenAt, zone);
  const corrected = new Date(photo.takenAt.getTime() - photo.clockErrorS * 1000);
  return `reads ${formatDayClock(photo.takenAt, zone)}, clock ${clockWords(photo.clockErrorS)}: ${formatDayClock(corrected, zone)}`;
}

/** `42 s fast`, `3 min slow` */
export function clockWords(clockErrorS: number): string {
  return `${spanWords(Math.abs(clockErrorS))} ${clockErrorS > 0 ? 'fast' : 'slow'}`;
}

function spanWords(seconds: number): string {
  if (seconds < 120) return `${seconds} s`;
  if (seconds < 7_200) return `${Math.round(seconds / 60)} min`;
  if (seconds < 172_800) return `${Math.round(seconds / 3_600)} h`;
  return `${Math.round(seconds / 86_400)} days`;
}

/** What a file offers, in words; its own clock reading is repeated as it stands. */
export function offersOf(photo: Pick<PhotoFacts, 'exif' | 'exifAnswer'>, zone: string): PhotoOffer[] {
  const offers: PhotoOffer[] = [];
  const instant = exifInstant(photo.exif, zone);
  if (instant && photo.exif.takenAtLocal) {
    // The file's own reading is repeated as it stands, not turned into another zone.
    const [year = '', month = '', day = ''] = photo.exif.takenAtLocal.split('T')[0]?.split('-') ?? [];
    const utcReading = new Date(Date.UTC(Number(year), Number(month) - 1, Number(day), Number(photo.exif.takenAtLocal.slice(11, 13)), Number(photo.exif.takenAtLocal.slice(14, 16))));
    const offset = photo.exif.utcOffset ?? `without an offset; read as the clock of the place, ${formatOffset(instant, zone)}`;
    offers.push({ kind: 'time', says: `The file says ${formatDayClock(utcReading, 'UTC')} ${offset}.`, question: "Use it as the photo's time?", answer: photo.exifAnswer.time });
  }
  const place = placeWords(photo.exif);
  if (place) offers.push({ kind: 'place', says: `The file says ${place}.`, question: `Use it as the photo's place${photo.exif.directionDeg === null ? '' : ' and direction'}?`, answer: photo.exifAnswer.place });
  return offers;
}

function placeWords(exif: PhotoExif): string | null {
  const degrees = (value: number, positive: string, negative: string) => `${Number(Math.abs(value).toFixed(4))}° ${value < 0 ? negative : positive}`;
  const position = exif.latitudeDeg !== null && exif.longitudeDeg !== null ? `${degrees(exif.latitudeDeg, 'N', 'S')}, ${degrees(exif.longitudeDeg, 'E', 'W')}` : null;
  const frame = exif.directionReference === 'true' ? ' from true north' : exif.directionReference === 'magnetic' ? ' from magnetic north' : ', north not stated';
  const direction = exif.directionDeg === null ? null : `camera pointing ${Math.round(exif.directionDeg)}°${frame}`;
  return [position, direction].filter(Boolean).join('; ') || null;
}

export function differenceWords(photo: Pick<PhotoFacts, 'takenAt' | 'clockErrorS'>, about: PhotoCaseFacts): string | null {
  const minutes = minutesFromFinding(photo, about);
  if (minutes === null || !about.foundAt) return null;
  return `Taken ${spanWords(Math.abs(minutes) * 60)} ${minutes > 0 ? 'after' : 'before'} the stated finding, ${formatDayClock(about.foundAt, about.zone)}. Check the camera's clock, or the finding.`;
}

function hashWords(photo: PhotoFacts, zone: string): string {
  const when = photo.hashCheckedAt ? `, ${formatDayClock(photo.hashCheckedAt, zone)}` : '';
  if (photo.hashCheck === 'same') return `same as at intake${when}`;
  if (photo.hashCheck === 'differs') return `differs, not used${when}`;
  return photo.hashCheck === 'missing' ? `missing from the store${when}` : 'not checked yet';
}

/** The finding of the sheet, weakest fact first. */
export function photoSheetSentence(cards: readonly PhotoCard[]): string {
  if (cards.length === 0) return 'No photo yet';
  const list = (labels: readonly number[]) => (labels.length === 1 ? `photo ${labels[0]}` : `photos ${labels.slice(0, -1).join(', ')} and ${labels.at(-1)}`);
  const bad = cards.filter(({ hashCheck }) => hashCheck === 'differs' || hashCheck === 'missing').map(({ label }) => label);
  if (bad.length > 0) return bad.length === 1 ? `The original of ${list(bad)} is not what came in` : `The originals of ${list(bad)} are not what came in`;
  const apart = cards.filter(({ differenceWords: words }) => words !== null).map(({ label }) => label);
  if (apart.length > 0) return apart.length === 1 ? `The time of ${list(apart)} does not go with the stated finding` : `The times of ${list(apart)} do not go with the stated finding`;
  const open = cards.filter(({ offers }) => offers.some(({ answer }) => answer === null)).map(({ label }) => label);
  if (open.length > 0) return open.length === 1 ? `What the file of ${list(open)} says is not confirmed yet` : `What the files of ${list(open)} say is not confirmed yet`;
  const nameless = cards.filter(({ view }) => view === null).map(({ label }) => label);
  if (nameless.length > 0) return nameless.length === 1 ? `The view of ${list(nameless)} is not stated` : `The views of ${list(nameless)} are not stated`;
  return `${cards.length === 1 ? 'One photo' : `${cards.length} photos`}, each with view and time settled`;
}
