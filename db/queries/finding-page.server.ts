import type { DbOrTx } from '#db/client.server.ts';
import { readMoveFacts } from './case-moves.server.ts';
import { findCase } from './case-subject.server.ts';
import type { CaseRow } from './case-subject.server.ts';
import { getFrozenFinding, listFindings, listReviewComments, readSignedBasis } from './findings.server.ts';
import type { CommentView, FindingView } from './findings.server.ts';
import { listHypotheses } from './hypotheses.server.ts';
import type { HypothesisView } from './hypotheses.server.ts';
import { isConclusionHidden } from './hidden-conclusion.server.ts';
import { moveChecklist } from '#app/domain/move-checklist.ts';
import { findMove } from '#app/domain/case-state.ts';
import { certaintyFacts, selectionObstacles } from '#app/domain/finding-form.ts';
import { certaintyObstacles, isConclusionField } from '#app/domain/finding.ts';
import { commentLabel, findingHeading, findingWords, versionView } from '#app/domain/finding-view.ts';
import type { CommentPin, FindingMode } from '#app/domain/finding-view.ts';
import { hypothesisKindLabels } from '#app/domain/hypothesis.ts';
import { formatDayClock } from '#app/domain/local-time.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import type { CaseSubject } from '#app/domain/permissions.ts';
import { maySettleComment, withAuthorship } from '#app/domain/review-rights.ts';
import { reviewInputs } from '#app/domain/review-inputs.ts';
import type { Actor } from '#app/domain/roles.ts';

export interface FindingPageQuery {
  readonly actor: Actor;
  readonly caseNumber: number;
  /** Version to be read; null takes the newest that the reader may see. */
  readonly version: number | null;
}

interface Context {
  readonly actor: Actor;
  readonly row: CaseRow;
  readonly subject: CaseSubject;
  readonly mode: FindingMode;
  readonly latest: FindingView | null;
  readonly opinionShown: boolean;
}

function modeOf(actor: Actor, subject: CaseSubject, latest: FindingView | null): FindingMode {
  if (canOnCase(actor, 'finding:write', subject)) return 'write';
  if (latest?.state !== 'sent') return 'read';
  return canOnCase(actor, 'finding:review', subject) ? 'review' : 'wait';
}

/**
 * The findings page of a case as this reader may have it; null when the case is not theirs to see. Where a reviewer has
 * not asked for the author's opinion, neither it nor any result leaves this function.
 */
export async function getFindingPage(db: DbOrTx, { actor, caseNumber, version }: FindingPageQuery) {
  const found = await findCase(db, actor, caseNumber);
  if (!found) return null;
  const mayReadDrafts = canOnCase(actor, 'finding:read-draft', found.subject);
  const all = await listFindings(db, { actor, caseNumber });
  const subject = withAuthorship(found.subject, all, actor.userId);
  if (!canOnCase(actor, 'finding:read-signed', subject)) return { allowed: false as const, whoCan: whoCan('finding:read-signed') };
  const readable = mayReadDrafts ? all : all.filter((finding) => finding.state === 'signed');
  const [latest = null] = all;
  const mode = modeOf(actor, subject, latest);
  const opinionShown = !(await isConclusionHidden(db, { actor, caseNumber }));
  const context: Context = { actor, row: found.row, subject, mode, latest: readable[0] ?? null, opinionShown };
  const hypotheses = await listHypotheses(db, { actor, caseNumber });
  const comments = mayReadDrafts ? pinsOf(context, all, await listReviewComments(db, { actor, caseNumber })) : [];
  const openComments = comments.filter((comment) => comment.settled === null).length;
  const form = mode === 'write' ? await formView(db, context, hypotheses) : null;
  const chosen = choose(context, readable, version);
  return {
    allowed: true as const,
    mode,
    heading: findingHeading({ mode, latest: context.latest, missing: form?.checklist.filter((line) => !line.done).length ?? 0, openComments, opinionShown, zone: found.row.zone }),
    caseVersion: found.row.version,
    opinionShown,
    versions: readable.map((finding) => versionView(finding, found.row.zone)),
    chosen: chosen ? { words: findingWords(chosen, hypothesisLabel(hypotheses, chosen.selectedHypothesisId)), note: noteOf(chosen, found.row.zone) } : null,
    before: chosen ? beforeOf(chosen, readable, hypotheses) : null,
    chosenVersion: chosen?.version ?? null,
    signed: chosen?.state === 'signed' ? await getFrozenFinding(db, { actor, caseNumber, version: chosen.version }) : null,
    form,
    comments,
    openComments,
    inputs: mode === 'review' ? await inputsOf(db, found.row) : [],
    reviewClosed: mode === 'review' ? null : mode === 'wait' || mode === 'write' ? whoCan('finding:review') : null,
  };
}

/** A reviewer who has not asked for the opinion is shown no version of it, earlier ones included. */
function choose({ mode, opinionShown, latest }: Context, readable: readonly FindingView[], version: number | null): FindingView | null {
  if (!opinionShown) return null;
  const asked = readable.find((finding) => finding.version === version);
  if (asked) return asked;
  return mode === 'write' ? null : latest;
}

/** The version before the chosen one, in words, for reading what changed; null for the first that this reader may see. */
function beforeOf(chosen: FindingView, readable: readonly FindingView[], hypotheses: readonly HypothesisView[]) {
  const earlier = readable.find((finding) => finding.version < chosen.version);
  return earlier ? findingWords(earlier, hypothesisLabel(hypotheses, earlier.selectedHypothesisId)) : null;
}

function hypothesisLabel(hypotheses: readonly HypothesisView[], id: string | null): string | null {
  const selected = hypotheses.find((hypothesis) => hypothesis.id === id);
  return selected ? hypothesisKindLabels[selected.kind] : null;
}

function noteOf(finding: FindingView, zone: string): string {
  if (finding.state === 'signed' && finding.signedAt) return `by ${finding.author}, signed by ${finding.reviewer ?? 'a reviewer'} ${formatDayClock(finding.signedAt, zone)}`;
  return `by ${finding.author}, version ${finding.version}, not signed`;
}

/** What others remarked on a conclusion quotes it, so those words wait for the opinion too. */
function pinsOf({ actor, row, subject, opinionShown }: Context, versions: readonly FindingView[], comments: readonly CommentView[]): CommentPin[] {
  return comments.map((comment, index) => {
    const authorId = versions.find((version) => version.id === comment.findingId)?.authorId ?? '';
    const settled = comment.settledAt ? `settled by ${comment.settledBy ?? 'a person'} ${formatDayClock(comment.settledAt, row.zone)}` : null;
    return {
      id: comment.id,
      pin: index + 1,
      field: comment.field,
      label: commentLabel(comment.field),
      body: !opinionShown && isConclusionField(comment.field) && comment.authorId !== actor.userId ? null : comment.body,
      by: `${comment.author}, ${formatDayClock(comment.createdAt, row.zone)}`,
      version: comment.version,
      settled,
      maySettle: settled === null && maySettleComment(actor, subject, authorId),
    };
  });
}

/** The draft of this person: their own, or a start from the newest version. */
async function formView(db: DbOrTx, { actor, row, latest }: Context, hypotheses: readonly HypothesisView[]) {
  const own = latest?.state === 'draft' && latest.authorId === actor.userId ? latest : null;
  const facts = await readMoveFacts(db, row);
  const send = findMove('send-findings');
  const selected = hypotheses.find((hypothesis) => hypothesis.id === own?.selectedHypothesisId) ?? null;
  const certaintyFits = own !== null && [...certaintyObstacles(own.certainty, certaintyFacts(hypotheses, own.selectedHypothesisId)), ...selectionObstacles(own.certainty, selected)].length === 0;
  return {
    openedAt: own?.updatedAt.toISOString() ?? '',
    caseVersion: row.version,
    startsFrom: own === null && latest !== null ? latest.version : null,
    stored: storedFields(latest),
    hypotheses: hypotheses.map(({ id, kind }) => ({ id, label: hypothesisKindLabels[kind] })),
    probableObstacles: certaintyObstacles('probable', certaintyFacts(hypotheses, own?.selectedHypothesisId ?? null)),
    checklist: [...(send ? moveChecklist(send, own ? facts : { ...facts, finding: null }) : []), { done: certaintyFits, label: 'A certainty that goes with the tests' }],
    asksReconstructionWaiver: facts.attachedReconstructions === 0,
    asksEvidenceWaiver: facts.photoCount === 0,
  };
}

function storedFields(finding: FindingView | null): Record<string, string> {
  if (!finding) return { certainty: 'undetermined', classification: 'not-classified', selectedHypothesisId: '' };
  const { opinion, certainty, classification, immediateCauses, underlyingCauses, rootCauses, limits } = finding;
  return { opinion, selectedHypothesisId: finding.selectedHypothesisId ?? '', certainty, classification, immediateCauses, underlyingCauses, rootCauses, limits };
}

async function inputsOf(db: DbOrTx, row: CaseRow) {
  const basis = await readSignedBasis(db, row.id);
  return reviewInputs({
    zone: row.zone,
    foundAt: row.foundAt,
    foundPrecision: row.foundPrecision,
    foundClockErrorS: row.foundClockErrorS,
    onsetEarliestAt: row.onsetEarliestAt,
    onsetLatestAt: row.onsetLatestAt,
    onsetBasis: row.onsetBasis,
    scene: basis.scene?.scene ?? null,
    sceneVersion: basis.scene?.version ?? null,
    run: basis.run,
    photos: basis.photos,
  });
}
