import type { Transaction } from '#db/client.server.ts';
import { getPerson } from '#db/queries/case-people.server.ts';
import { readSignedBasis } from '#db/queries/findings.server.ts';
import type { FindingRow } from '#db/queries/findings.server.ts';
import { listHypothesesOfCase } from '#db/queries/hypotheses.server.ts';
import type { Actor } from '#app/domain/roles.ts';
import { hashOf } from '#app/storage/sha256.server.ts';

const iso = (instant: Date | null) => instant?.toISOString() ?? null;

/**
 * What a signature covers, whole: the finding, the hypotheses as they stood, the measured scene, which reconstruction it
 * rests on, and the hash of every photo; with the SHA-256 of its canonical JSON. Written once.
 */
export async function freezeFinding(
  tx: Transaction,
  { finding, reviewer, signedAt }: { readonly finding: FindingRow; readonly reviewer: Actor; readonly signedAt: Date },
): Promise<{ frozen: Record<string, unknown>; frozenHash: string }> {
  const basis = await readSignedBasis(tx, finding.caseId);
  const hypotheses = await listHypothesesOfCase(tx, finding.caseId);
  const author = await getPerson(tx, finding.authorId);
  const frozen = {
    case: {
      number: basis.case.number,
      zone: basis.case.zone,
      foundAt: iso(basis.case.foundAt),
      foundClockErrorS: basis.case.foundClockErrorS,
      onsetEarliestAt: iso(basis.case.onsetEarliestAt),
      onsetLatestAt: iso(basis.case.onsetLatestAt),
      onsetBasis: basis.case.onsetBasis,
    },
    finding: {
      version: finding.version,
      opinion: finding.opinion,
      selectedHypothesisId: finding.selectedHypothesisId,
      certainty: finding.certainty,
      classification: finding.classification,
      immediateCauses: finding.immediateCauses,
      underlyingCauses: finding.underlyingCauses,
      rootCauses: finding.rootCauses,
      limits: finding.limits,
      author: author?.displayName ?? finding.authorId,
      authorId: finding.authorId,
      sentAt: iso(finding.sentAt),
      reviewer: reviewer.displayName,
      reviewerId: reviewer.userId,
      signedAt: signedAt.toISOString(),
    },
    hypotheses: hypotheses.map(({ id, kind, statement, predicts, evidenceFor, evidenceAgainst, tests, result, testedBy }) => ({ id, kind, statement, predicts, evidenceFor, evidenceAgainst, tests, result, testedBy })),
    scene: basis.scene,
    reconstruction: basis.run,
    photos: basis.photos,
  };
  return { frozen, frozenHash: hashOf(frozen) };
}
