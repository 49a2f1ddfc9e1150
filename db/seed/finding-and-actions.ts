import { eq } from 'drizzle-orm';
import type { DemoCase } from '#fixtures/demo/demo-case.ts';
import type { Transaction } from '#db/client.server.ts';
import { getActor } from '#db/queries/actors.server.ts';
import { correctiveActions, findings, hypotheses, reviewComments, sunReturns } from '#db/schema/all.ts';
import { effectivenessCheckOn } from '#app/domain/corrective-action.ts';
import { localDay } from '#app/domain/local-time.ts';
import { freezeFinding } from '#app/services/findings/freeze-finding.server.ts';
import { moment } from './moment.ts';
import { pick } from './people-and-sites.ts';
import type { DemoPlaces } from './people-and-sites.ts';

interface Target {
  readonly caseId: string;
  readonly zone: string;
  readonly places: DemoPlaces;
}

/** Hypotheses, and the finding in the state that the demonstration wants, signed by freezing as a reviewer does. */
export async function seedFinding(tx: Transaction, demo: DemoCase, { caseId, zone, places }: Target): Promise<void> {
  const testerId = demo.investigator ? pick(places.userIds, demo.investigator) : null;
  const rows = demo.hypotheses?.length
    ? await tx.insert(hypotheses).values(demo.hypotheses.map((hypothesis) => ({ ...hypothesis, caseId, testedById: testerId }))).returning()
    : [];
  const { finding } = demo;
  if (!finding) return;
  const selected = rows.find((row) => row.result === 'probable');
  const sentAt = finding.sentLocal ? moment(finding.sentLocal, zone) : null;
  const [row] = await tx
    .insert(findings)
    .values({
      caseId,
      version: 1,
      state: finding.state === 'signed' ? 'sent' : finding.state,
      opinion: finding.opinion,
      selectedHypothesisId: finding.certainty === 'undetermined' ? null : (selected?.id ?? null),
      certainty: finding.certainty,
      classification: finding.classification,
      immediateCauses: finding.immediate,
      underlyingCauses: finding.underlying,
      rootCauses: finding.root,
      limits: finding.limits,
      authorId: pick(places.userIds, finding.author),
      sentAt,
    })
    .returning();
  if (!row) throw new Error('The finding was not stored.');
  if (demo.reviewComment) {
    await tx.insert(reviewComments).values({ findingId: row.id, field: demo.reviewComment.field, body: demo.reviewComment.body, authorId: pick(places.userIds, 'odile'), createdAt: moment(demo.reviewComment.local, zone) });
  }
  if (finding.state !== 'signed' || !finding.reviewer || !finding.signedLocal) return;
  const reviewer = await getActor(tx, pick(places.userIds, finding.reviewer));
  if (!reviewer) throw new Error('The reviewer of the demonstration is missing.');
  const signedAt = moment(finding.signedLocal, zone);
  const { frozen, frozenHash } = await freezeFinding(tx, { finding: row, reviewer, signedAt });
  await tx.update(findings).set({ state: 'signed', reviewerId: reviewer.userId, reviewedAt: signedAt, signedAt, frozen, frozenHash }).where(eq(findings.id, row.id));
}

export async function seedActions(tx: Transaction, demo: DemoCase, { caseId, zone, places }: Target): Promise<void> {
  const returns = await tx.select({ onDay: sunReturns.onDay }).from(sunReturns).where(eq(sunReturns.caseId, caseId));
  for (const [index, action] of (demo.actions ?? []).entries()) {
    const verifiedAt = action.verifiedLocal ? moment(action.verifiedLocal, zone) : null;
    const effectAt = action.effect ? moment(action.effect.local, zone) : null;
    const verifierId = pick(places.userIds, action.verifier);
    await tx.insert(correctiveActions).values({
      caseId,
      number: index + 1,
      title: action.title,
      why: action.why,
      controlLevel: action.level,
      interim: action.interim ?? false,
      ownerId: pick(places.userIds, action.owner),
      verifierId,
      dueOn: action.dueOn,
      risk: action.risk,
      cost: action.cost?.amount ?? null,
      costCurrency: action.cost?.currency ?? null,
      state: action.state,
      proof: action.proof ?? '',
      doneAt: action.doneLocal ? moment(action.doneLocal, zone) : null,
      verifiedAt,
      verifiedById: verifiedAt ? verifierId : null,
      effectCheckOn: verifiedAt ? (effectAt ? localDay(effectAt, zone) : effectivenessCheckOn(localDay(verifiedAt, zone), returns.map((day) => day.onDay))) : null,
      effectNote: action.effect?.note ?? '',
      effectAt,
      effectById: effectAt ? verifierId : null,
      withdrawnReason: action.state === 'withdrawn' ? 'Checked with the sun back on 22 March 2026: the strip was still there. Replaced by action 3.' : null,
      createdById: demo.investigator ? pick(places.userIds, demo.investigator) : null,
    });
  }
}
