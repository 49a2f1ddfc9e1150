import { inTransaction } from '#db/client.server.ts';
import { claimDueMail, markMailFailed, markMailSent } from '#db/queries/outbox.server.ts';
import { deliver } from '#app/mail/transport.server.ts';

/**
 * Sends what is due, one message per transaction: the row stays locked while it is sent, so that two workers never send
 * the same one, and a message that fails waits for its next try without holding up the others.
 */
export async function sendDueMail(): Promise<{ sent: number; failed: number }> {
  let sent = 0;
  let failed = 0;
  for (;;) {
    const outcome = await inTransaction(async (tx) => {
      const [message] = await claimDueMail(tx, 1);
      if (!message) return 'none';
      try {
        await deliver({ ...message, messageId: message.id });
      } catch (error) {
        await markMailFailed(tx, message.id, error instanceof Error ? error.message : String(error));
        return 'failed';
      }
      await markMailSent(tx, message.id);
      return 'sent';
    });
    if (outcome === 'none') return { sent, failed };
    if (outcome === 'sent') sent += 1;
    else failed += 1;
  }
}
