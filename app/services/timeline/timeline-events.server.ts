import { inTransaction } from '#db/client.server.ts';
import { getAttachmentOfCase } from '#db/queries/attachments.server.ts';
import { lockCase } from '#db/queries/case-subject.server.ts';
import { insertTimelineEvent, lockTimelineEvent, markEventWithdrawn } from '#db/queries/timeline.server.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import type { Actor } from '#app/domain/roles.ts';
import { timelineSourceLabels, trueTime } from '#app/domain/timeline.ts';
import type { TimelineEventForm } from '#app/domain/timeline.ts';
import { authorize } from '#app/services/authorize.ts';
import { logLine } from '#app/services/log-line.server.ts';

export interface AddTimelineEvent {
  readonly actor: Actor;
  readonly caseNumber: number;
  readonly event: TimelineEventForm;
  readonly readingAt: Date;
  readonly now: Date;
}

/**
 * Enters what a log or a recording shows, as its clock showed it, with the error of that clock. The same form sent again
 * changes nothing.
 *
 * @throws DomainError `not-found`, `forbidden`, or `invalid-input` beside the field.
 */
export async function addTimelineEvent({ actor, caseNumber, event, readingAt, now }: AddTimelineEvent): Promise<void> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'timeline:write', found.subject);
    const { clientId, source, sourceName, clockErrorMin: clockErrorS, clockErrorBasis, what, attachmentId } = event;
    const at = trueTime(readingAt, clockErrorS);
    const fieldErrors: Record<string, string[]> = {};
    if (at.getTime() > now.getTime()) fieldErrors['readingAt'] = ['With this clock error the event is still to come. Check the reading and the error.'];
    if (attachmentId && !(await getAttachmentOfCase(tx, { caseId: found.row.id, attachmentId }))) fieldErrors['attachmentId'] = ['Choose one of the documents of this case.'];
    if (Object.keys(fieldErrors).length > 0) throw new DomainError('invalid-input', 'The event was not entered yet.', { fieldErrors });
    const eventId = await insertTimelineEvent(tx, { caseId: found.row.id, clientId, source, sourceName, readingAt, clockErrorS, clockErrorBasis, what, attachmentId, createdById: actor.userId });
    if (eventId === null) return;
    await logLine(tx, actor, found.row, {
      event: 'timeline.event-entered',
      subject: 'timeline_events',
      subjectId: eventId,
      summary: `Event entered in the timeline from ${timelineSourceLabels[source].toLowerCase()}.`,
      after: { source, sourceName, readingAt: readingAt.toISOString(), clockErrorS, clockErrorBasis, what, attachmentId },
    });
  });
}

/** Takes a wrong event out of the reckoning. It stays to be read, struck through, with the reason. */
export async function withdrawTimelineEvent({ actor, caseNumber, eventId, reason, now }: { readonly actor: Actor; readonly caseNumber: number; readonly eventId: string; readonly reason: string; readonly now: Date }): Promise<void> {
  return inTransaction(async (tx) => {
    const found = await lockCase(tx, actor, caseNumber);
    if (!found) throw notFound('The case');
    authorize(actor, 'timeline:write', found.subject);
    const event = await lockTimelineEvent(tx, { caseId: found.row.id, eventId });
    if (!event) throw notFound('The event');
    if (event.withdrawnAt) throw new DomainError('conflict', 'This event is withdrawn already.');
    await markEventWithdrawn(tx, event.id, { at: now, reason });
    await logLine(tx, actor, found.row, { event: 'timeline.event-withdrawn', subject: 'timeline_events', subjectId: event.id, summary: 'Event of the timeline withdrawn.', reason, before: { withdrawn: false }, after: { withdrawn: true } });
  });
}
