import { formatDay, formatDayClock } from './local-time.ts';
import { redactedWords } from './redact-text.ts';
import type { Audience } from './release-policy.ts';
import { audienceLabels } from './release-policy.ts';
import type { RedactedText, WithheldClass, WithheldCounts } from './released-case.ts';
import { withheldClasses, withheldLabels } from './released-case.ts';

/** What a page says of a release besides the document itself. */
export interface ReleaseFrame {
  readonly number: number;
  readonly audienceWords: string;
  readonly recipient: string;
  readonly frozenWords: string;
  readonly endsWords: string;
  readonly changeNote: string;
  readonly releasedHash: string;
  readonly withheld: readonly WithheldLine[];
  readonly manifest: readonly ManifestLine[];
}

export interface WithheldLine {
  readonly count: number;
  readonly label: string;
  readonly meaning: string;
}
export interface ManifestLine {
  readonly name: string;
  readonly change: string;
  readonly bytes: string;
  readonly sha256: string;
}

const meanings: Record<WithheldClass, string> = {
  personal: 'names, numbers, boxes in photos',
  health: 'injury beyond treatment',
  child: 'anything about a child',
  legal: 'marked parts, advice, drafts; count only',
  'exact-place': 'pin, address, place in photos',
  commercial: 'cost of actions',
  'free-text': 'sentences that were not shared',
  photo: 'photos that were not shared',
};

export function withheldLines(counts: Partial<WithheldCounts>): readonly WithheldLine[] {
  return withheldClasses.map((one) => ({ count: counts[one] ?? 0, label: withheldLabels[one], meaning: meanings[one] }));
}

export const withheldTotal = (counts: Partial<WithheldCounts>): number => withheldClasses.reduce((sum, one) => sum + (counts[one] ?? 0), 0);

interface FrameSource {
  readonly number: number;
  readonly audience: Audience;
  readonly changeNote: string;
  readonly releasedHash: string;
  readonly withheld: Partial<WithheldCounts>;
  readonly files: readonly { readonly name: string; readonly change: string; readonly bytes: number; readonly sha256: string }[];
  readonly frozenAt: Date;
  readonly expiresAt: Date;
}

export const zoneName = (zone: string): string => zone.replaceAll('_', ' ');

export function releaseFrame(release: FrameSource, recipient: string, zone: string): ReleaseFrame {
  return {
    number: release.number,
    audienceWords: release.audience === 'insurer' ? 'an insurer' : 'another party',
    recipient,
    frozenWords: formatDay(release.frozenAt, zone),
    endsWords: `${formatDayClock(release.expiresAt, zone)}, ${zoneName(zone)}`,
    changeNote: release.changeNote,
    releasedHash: release.releasedHash,
    withheld: withheldLines(release.withheld),
    manifest: release.files.map(({ name, change, bytes, sha256 }) => ({ name, change, bytes: bytes.toLocaleString('en-GB'), sha256 })),
  };
}

export type ReleaseStatus = 'prepared' | 'released' | 'withdrawn' | 'ended';
export const releaseStatusWords: Record<ReleaseStatus, string> = { prepared: 'Waits for a second person', released: 'Open to its readers', withdrawn: 'Withdrawn', ended: 'Ended' };

export function releaseStatus(release: { readonly state: 'prepared' | 'released' | 'withdrawn'; readonly expiresAt: Date }, now: Date): ReleaseStatus {
  return release.state === 'released' && release.expiresAt.getTime() <= now.getTime() ? 'ended' : release.state;
}

/** A row of the lists that the team keeps. */
export interface KeptReleaseView {
  readonly id: string;
  readonly caseNumber: number;
  readonly caseTitle: string;
  readonly number: number;
  readonly audience: string;
  readonly recipient: string;
  readonly status: string;
  readonly statusNote: string;
  readonly withheld: number;
  readonly hashShort: string;
  readonly ends: string;
  readonly openings: number;
  readonly changeNote: string;
}

export interface KeptReleaseFacts {
  readonly id: string;
  readonly caseNumber: number;
  readonly caseTitle: string;
  readonly number: number;
  readonly audience: Audience;
  readonly state: 'prepared' | 'released' | 'withdrawn';
  readonly recipient: string;
  readonly preparedBy: string;
  readonly approvedBy: string | null;
  readonly approvedAt: Date | null;
  readonly withdrawnAt: Date | null;
  readonly withdrawnReason: string | null;
  readonly createdAt: Date;
  readonly expiresAt: Date;
  readonly withheld: Partial<WithheldCounts>;
  readonly releasedHash: string;
  readonly openings: number;
  readonly changeNote: string;
  readonly zone: string;
}

export function keptRelease(release: KeptReleaseFacts, now: Date): KeptReleaseView {
  return {
    id: release.id,
    caseNumber: release.caseNumber,
    caseTitle: release.caseTitle,
    number: release.number,
    audience: audienceLabels[release.audience],
    recipient: release.recipient,
    status: releaseStatusWords[releaseStatus(release, now)],
    statusNote: statusNote(release),
    withheld: withheldTotal(release.withheld),
    hashShort: shortHash(release.releasedHash),
    ends: formatDay(release.expiresAt, release.zone),
    openings: release.openings,
    changeNote: release.changeNote,
  };
}

function statusNote({ zone, ...release }: KeptReleaseFacts): string {
  if (release.withdrawnAt) return `${formatDay(release.withdrawnAt, zone)}: ${release.withdrawnReason ?? ''}`;
  if (release.approvedAt) return `Prepared by ${release.preparedBy}, approved by ${release.approvedBy ?? 'a person who left'} ${formatDay(release.approvedAt, zone)}`;
  return `Prepared by ${release.preparedBy} ${formatDay(release.createdAt, zone)}`;
}

/** `7be1 90c4 d2a8 3f06`, the first eight bytes. */
export const shortHash = (sha256: string): string => (sha256.slice(0, 16).match(/.{4}/gu) ?? []).join(' ');

/** The heading of a case's releases, which says where its newest one stands. */
export function releasesSentence(list: readonly KeptReleaseFacts[], now: Date): string {
  const open = list.filter((release) => releaseStatus(release, now) === 'released');
  const waiting = list.find((release) => release.state === 'prepared');
  const newest = open[0];
  if (waiting) return `Release ${waiting.number} waits for a second person`;
  if (newest) return `Release ${newest.number} is open to ${newest.recipient} until ${formatDay(newest.expiresAt, newest.zone)}`;
  return list.length === 0 ? 'Nothing of this case has left the house' : 'No release of this case is open';
}

/** A row of the list that a reader sees. */
export interface ReaderReleaseView {
  readonly id: string;
  readonly caseNumber: number;
  readonly title: string;
  readonly siteName: string | null;
  readonly number: number;
  readonly released: string;
  readonly ends: string;
  readonly changeNote: string;
  readonly withheld: number;
}

export function readerRelease(line: { readonly id: string; readonly caseNumber: number; readonly title: RedactedText; readonly siteName: string | null; readonly number: number; readonly approvedAt: Date | null; readonly expiresAt: Date; readonly changeNote: string; readonly withheld: Partial<WithheldCounts>; readonly zone: string }): ReaderReleaseView {
  return {
    id: line.id,
    caseNumber: line.caseNumber,
    title: redactedWords(line.title),
    siteName: line.siteName,
    number: line.number,
    released: line.approvedAt ? formatDay(line.approvedAt, line.zone) : '',
    ends: formatDay(line.expiresAt, line.zone),
    changeNote: line.changeNote,
    withheld: withheldTotal(line.withheld),
  };
}
