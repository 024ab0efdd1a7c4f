import type { JobPayload } from '#shared/contract/jobs.ts';
import { listDeliveryAlerts, lockDelivery, markSent, noteFailure } from '#server/data/deliveries.repository.ts';
import { alertMessage } from '../mail/alert-message.ts';
import type { WorkerContext } from '../context.ts';

/**
 * Sends one delivery. The row is locked while it is sent, so no second worker sends it; a message accepted by the mail
 * server just before a crash would be sent again, under the same Message-ID, which lets mail servers drop it.
 */
export async function sendMail(
  context: WorkerContext,
  payload: JobPayload<'send-mail'>,
  isLastAttempt: boolean,
): Promise<void> {
  const { utilityId, deliveryId } = payload;
  const actor = { utilityId, personId: null, requestId: null };
  try {
    await context.database.withUtility(actor, async (tx) => {
      const delivery = await lockDelivery(tx, deliveryId);
      if (delivery === null || delivery.state !== 'waiting') return;
      const message = alertMessage(
        delivery,
        await listDeliveryAlerts(tx, deliveryId),
        context.config.STILLSPAN_PUBLIC_URL,
      );
      await context.mailer.sendMail({
        ...message,
        from: context.config.STILLSPAN_MAIL_FROM,
        to: { name: delivery.recipientName, address: delivery.recipientEmail },
        messageId: `<delivery-${deliveryId}@${new URL(context.config.STILLSPAN_PUBLIC_URL).hostname}>`,
      });
      await markSent(tx, deliveryId);
    });
  } catch (error) {
    const detail = error instanceof Error ? error.message : String(error);
    await context.database.withUtility(actor, (tx) => noteFailure(tx, { deliveryId, detail, isLast: isLastAttempt }));
    throw error;
  }
}
