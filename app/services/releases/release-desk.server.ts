import { db } from '#db/client.server.ts';
import { readCaseBeforeRedaction } from '#db/queries/case-before-redaction.server.ts';
import { latestDecisions, listCaseReleases, listRecipientOrganisations } from '#db/queries/releases.server.ts';
import type { CaseBeforeRedaction, PhotoBeforeRedaction } from '#app/domain/case-before-redaction.ts';
import { notFound } from '#app/domain/errors.ts';
import { namesLikeWords } from '#app/domain/held-names.ts';
import { photoViewLabels } from '#app/domain/incident.ts';
import { linesToDecide, photoKey } from '#app/domain/lines-to-decide.ts';
import type { LineToDecide } from '#app/domain/lines-to-decide.ts';
import type { PhotoMask } from '#app/domain/photo.ts';
import { heldWords, redactCase } from '#app/domain/redaction.ts';
import type { Decisions, LineDecision } from '#app/domain/redaction.ts';
import { markText, searcherFor } from '#app/domain/redact-text.ts';
import type { MarkedPiece, Searcher } from '#app/domain/redact-text.ts';
import { expiryDays } from '#app/domain/release-form.ts';
import type { Audience } from '#app/domain/release-policy.ts';
import { keptRelease, releasesSentence, withheldLines } from '#app/domain/release-view.ts';
import type { KeptReleaseView, WithheldLine } from '#app/domain/release-view.ts';
import type { Actor } from '#app/domain/roles.ts';
import { authorize } from '#app/services/authorize.ts';
import { basisOf } from './prepare-release.server.ts';

export interface DeskLine {
  readonly key: string;
  readonly label: string;
  readonly pieces: readonly MarkedPiece[];
  readonly decision: LineDecision | null;
}
export interface DeskPhoto {
  readonly key: string;
  readonly photoId: string;
  readonly label: number;
  readonly viewWords: string;
  readonly alternative: string;
  readonly masks: readonly PhotoMask[];
  readonly releasable: PhotoBeforeRedaction['releasable'];
  readonly decision: LineDecision | null;
}

/** What the page needs on which releases of a case are listed and the next one is prepared. */
export interface ReleaseDesk {
  readonly caseNumber: number;
  readonly zone: string;
  readonly heading: string;
  readonly releases: readonly KeptReleaseView[];
  readonly audience: Audience;
  readonly lines: readonly DeskLine[];
  readonly photos: readonly DeskPhoto[];
  readonly recipients: readonly { readonly id: string; readonly name: string; readonly readers: number }[];
  readonly expiry: { readonly first: string; readonly proposed: string; readonly last: string };
  readonly basis: string;
  /** What would be withheld with the decisions that the page begins with. */
  readonly withheld: readonly WithheldLine[];
  readonly namesHeld: number;
  readonly namesLikeWords: readonly string[];
}

/**
 * Everything that is decided on, for those who may prepare a release.
 *
 * @throws DomainError `not-found` or `forbidden`.
 */
export async function getReleaseDesk({ actor, caseNumber, audience, now }: { readonly actor: Actor; readonly caseNumber: number; readonly audience: Audience; readonly now: Date }): Promise<ReleaseDesk> {
  const found = await readCaseBeforeRedaction(db, { actor, caseNumber });
  if (!found) throw notFound('The case');
  authorize(actor, 'release:prepare', found.subject);
  const { source } = found;
  const held = heldWords(source, audience);
  const searcher = searcherFor(held);
  const decisions = await latestDecisions(db, { caseId: found.caseId, audience });
  const releases = await listCaseReleases(db, { actor, caseNumber });
  return {
    caseNumber,
    zone: source.zone,
    heading: releasesSentence(releases, now),
    releases: releases.map((release) => keptRelease(release, now)),
    audience,
    lines: linesToDecide(source, audience).map((line) => deskLine(line, searcher, decisions)),
    photos: deskPhotos(source, decisions),
    recipients: await listRecipientOrganisations(db, { organisationId: found.organisationId, audience }),
    expiry: expiryDays(now, source.zone),
    basis: basisOf(source, audience),
    withheld: withheldLines(redactCase(source, audience, decisions).withheld),
    namesHeld: held.names.length,
    namesLikeWords: namesLikeWords(held.names),
  };
}

const deskLine = ({ key, label, text }: LineToDecide, searcher: Searcher, decisions: Decisions): DeskLine => ({ key, label, pieces: markText(text, searcher), decision: decisions[key] ?? null });

function deskPhotos(source: CaseBeforeRedaction, decisions: Decisions): DeskPhoto[] {
  return source.photos.map((photo) => {
    const viewWords = photo.view ? photoViewLabels[photo.view] : 'View not stated';
    const key = photoKey(photo);
    return {
      key,
      photoId: photo.photoId,
      label: photo.label,
      viewWords,
      alternative: photo.altText || photo.caption || `Photo ${photo.label}, ${viewWords.toLowerCase()}`,
      masks: photo.masks,
      releasable: photo.releasable,
      decision: decisions[key] ?? null,
    };
  });
}
