import nodemailer from 'nodemailer';
import type { Transporter } from 'nodemailer';
import { env } from '#app/env.server.ts';

export interface OutgoingMail {
  readonly toAddress: string;
  readonly subject: string;
  readonly bodyText: string;
  readonly bodyHtml: string;
  /** The outbox row, so that a message sent twice after a crash is recognised as one by the receiver. */
  readonly messageId: string;
}

/** A server that does not answer is given up for this turn, since a row of the outbox is held meanwhile. */
const patience = { connectionTimeout: 10_000, greetingTimeout: 10_000, socketTimeout: 30_000 } as const;

let transporter: Transporter | undefined;

/** A server on this machine has no certificate; any other one is spoken to in TLS as the address says. */
const isLoopback = /\/\/(?:[^@/]*@)?(?:localhost|127\.0\.0\.1|\[::1\])/u;

function connection(): Transporter {
  transporter ??= nodemailer.createTransport({ url: env.SMTP_URL, ignoreTLS: isLoopback.test(env.SMTP_URL), ...patience });
  return transporter;
}

export async function deliver(mail: OutgoingMail): Promise<void> {
  await connection().sendMail({
    from: env.MAIL_FROM,
    to: mail.toAddress,
    subject: mail.subject,
    text: mail.bodyText,
    html: mail.bodyHtml,
    messageId: `<${mail.messageId}@scorchline.example>`,
  });
}
