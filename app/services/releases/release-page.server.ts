import { db } from '#db/client.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { findKeptRelease, listOpenings } from '#db/queries/releases.server.ts';
import { notFound } from '#app/domain/errors.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import type { ReleaseCheck } from '#app/domain/release-check.ts';
import { releaseDocument } from '#app/domain/release-document.ts';
import type { ReleaseDocument } from '#app/domain/release-document.ts';
import { keptRelease, releaseFrame, releaseStatus } from '#app/domain/release-view.ts';
import type { KeptReleaseView, ReleaseFrame, ReleaseStatus } from '#app/domain/release-view.ts';
import type { Actor } from '#app/domain/roles.ts';
import { subjectFor } from './approve-release.server.ts';
import { inspectRelease } from './check-release.server.ts';

export interface ReleasePage {
  readonly id: string;
  readonly zone: string;
  readonly line: KeptReleaseView;
  readonly status: ReleaseStatus;
  readonly frame: ReleaseFrame;
  readonly document: ReleaseDocument;
  readonly checks: readonly ReleaseCheck[];
  readonly passed: boolean;
  readonly caseUnchanged: boolean;
  readonly preparedBy: string;
  readonly isPreparer: boolean;
  readonly mayApprove: boolean;
  readonly whoCanApprove: string;
  readonly mayWithdraw: boolean;
  readonly openings: readonly { readonly atWords: string; readonly reader: string }[];
  readonly watermark: string;
}

/**
 * One release for those who keep it: the document as its reader sees it, what the searches of its bytes found, and what
 * may be done.
 *
 * @throws DomainError `not-found`.
 */
export async function getReleasePage({ actor, caseNumber, number, now }: { readonly actor: Actor; readonly caseNumber: number; readonly number: number; readonly now: Date }): Promise<ReleasePage> {
  const found = await findKeptRelease(db, { actor, caseNumber, number });
  const kept = await findCase(db, actor, caseNumber);
  if (!found || !kept) throw notFound('The release');
  const { release } = found;
  const { zone } = kept.row;
  const subject = subjectFor(kept.subject, release, actor);
  const { checks, passed, caseUnchanged } = await inspectRelease(db, { actor, caseNumber, release });
  const openings = await listOpenings(db, { actor, releaseId: release.id });
  const opened = formatDayClock(now, zone);
  return {
    id: release.id,
    zone,
    line: keptRelease({ ...release, caseNumber, caseTitle: kept.row.title, recipient: found.recipient, preparedBy: found.preparedBy, approvedBy: found.approvedBy, openings: found.openings, zone }, now),
    status: releaseStatus(release, now),
    frame: releaseFrame({ ...release, frozenAt: release.approvedAt ?? release.createdAt }, found.recipient, zone),
    document: releaseDocument(release.released),
    checks,
    passed,
    caseUnchanged,
    preparedBy: found.preparedBy,
    isPreparer: release.preparedById === actor.userId,
    mayApprove: canOnCase(actor, 'release:approve', subject),
    whoCanApprove: whoCan('release:approve'),
    mayWithdraw: release.state !== 'withdrawn' && canOnCase(actor, 'release:prepare', kept.subject),
    openings: openings.map((opening) => ({ atWords: formatDayClock(opening.at, zone), reader: opening.reader })),
    watermark: `Release ${release.number} · ${found.recipient} · read in the house ${opened}`,
  };
}
