import { noticeAnswerLabels, noticeWayLabels, partyRoleLabels, standingAnswer } from './evidence-notice.ts';
import { evidenceKindLabels, examKindLabels, holderRoleLabels, itemCode } from './evidence.ts';
import type { ItemFacts } from './evidence-view.ts';
import { formatDay, formatDayClock } from './local-time.ts';
import { planNeeds } from './planned-exam.ts';
import type { ReportedItem } from './report-source.ts';

/** An item as the report in the house shows it: holders and parties by their part, never by name. `at`: when the report is put together. */
export function reportedItem(facts: ItemFacts, caseNumber: number, zone: string, at: Date): ReportedItem {
  const { item, custody, exams } = facts;
  return {
    code: itemCode(caseNumber, item.label),
    description: item.description,
    inBrief: false,
    kind: evidenceKindLabels[item.kind],
    seal: item.sealNumber ? `seal ${item.sealNumber}` : 'no seal',
    fromWhere: item.fromWhere,
    custody: custody.map((record) => ({ from: formatDayClock(record.fromAt, zone), to: record.toAt ? formatDayClock(record.toAt, zone) : 'holds it now', holder: holderRoleLabels[record.holderRole], purpose: record.purpose, condition: record.condition })),
    exams: exams.map((exam) => ({ when: formatDayClock(exam.performedAt, zone), kind: examKindLabels[exam.kind], method: exam.method, result: [exam.result, exam.wentAheadReason && `Made in spite of what stood against it: ${exam.wentAheadReason}`].filter(Boolean).join(' '), notice: exam.noticeAt ? `${exam.noticeTo}, ${formatDayClock(exam.noticeAt, zone)}` : 'none recorded' })),
    planned: plannedOf(facts, zone, at),
    notices: noticesOf(facts, zone, at),
  };
}

function plannedOf({ plans, notices }: ItemFacts, zone: string, at: Date): ReportedItem['planned'] {
  return plans.filter((plan) => plan.outcome !== 'made').map((plan) => {
    const open = planNeeds(plan, notices, { now: at, zone }).filter((need) => !need.done);
    const lacks = open.map((need) => `${need.words}: ${need.note}`).join('; ');
    return { when: formatDayClock(plan.plannedAt, zone), method: plan.method, lacks: plan.outcome === 'cancelled' ? `cancelled: ${plan.cancelReason}` : lacks || 'nothing' };
  });
}

function noticesOf({ plans, notices }: ItemFacts, zone: string, at: Date): ReportedItem['notices'] {
  return notices.map((notice) => {
    const answer = standingAnswer(notice, at);
    const plan = plans.find((one) => one.id === notice.planId);
    return {
      told: partyRoleLabels[notice.partyRole],
      sent: formatDayClock(notice.sentAt, zone),
      way: noticeWayLabels[notice.way],
      about: plan ? `examination of ${formatDay(plan.plannedAt, zone)}` : 'the item',
      answer: answer ? `${noticeAnswerLabels[answer.answer]}, ${formatDay(answer.answeredAt, zone)}` : 'none yet',
    };
  });
}
