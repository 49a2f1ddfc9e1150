import { attachmentCode } from './attachment.ts';
import type { DocumentFacts } from './document-view.ts';
import { objections, partyList } from './evidence-notice.ts';
import { itemCode } from './evidence.ts';
import type { ItemFacts } from './evidence-view.ts';
import { noticesFor, planNeeds } from './planned-exam.ts';

interface Standing {
  readonly caseNumber: number;
  readonly zone: string;
  readonly now: Date;
}

/** The finding of the page, weakest fact first. */
export function evidenceHeading(items: readonly ItemFacts[], documents: readonly Pick<DocumentFacts, 'label' | 'hashCheck'>[], standing: Standing): string {
  const broken = documents.filter((document) => document.hashCheck === 'differs' || document.hashCheck === 'missing').map((document) => attachmentCode(document.label));
  if (broken.length > 0) return `The stored file of document ${broken.join(', ')} is not what came in`;
  if (items.length === 0) return 'No item has been collected';
  const codes = (list: readonly ItemFacts[]) => list.map(({ item }) => itemCode(standing.caseNumber, item.label)).join(', ');
  const unsealed = items.filter(({ item }) => item.sealNumber === '' && item.kind !== 'record');
  if (unsealed.length > 0) return `${codes(unsealed)} ${unsealed.length === 1 ? 'has' : 'have'} no seal`;
  const planned = items.flatMap((one) => planHeading(one, standing) ?? []);
  if (planned[0]) return planned[0];
  const offered = items.filter(({ offers }) => offers.some((offer) => offer.answer === null));
  if (offered.length > 0) return `${codes(offered)} ${offered.length === 1 ? 'waits' : 'wait'} for the signature of the receiver`;
  const undecided = items.filter(({ item }) => item.disposal === 'undecided');
  if (undecided.length > 0) return `What becomes of ${codes(undecided)} is not decided`;
  return items.length === 1 ? 'One item, in known hands since it was collected' : `${items.length} items, in known hands since they were collected`;
}

/** What stands against a planned examination; null when nothing does. */
function planHeading({ item, plans, notices }: ItemFacts, { caseNumber, zone, now }: Standing): string | null {
  const code = itemCode(caseNumber, item.label);
  for (const plan of plans.filter((one) => one.outcome === null)) {
    const against = objections(noticesFor(plan.id, notices), now).map((notice) => notice.partyRole);
    if (against.length > 0) return `The examination planned for ${code} meets an objection: ${partyList(against)}`;
    const open = planNeeds(plan, notices, { now, zone }).filter((need) => !need.done).length;
    if (open > 0) return `The examination planned for ${code} still lacks ${open === 1 ? 'one thing' : `${open} things`}`;
  }
  return null;
}
