import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

export interface ReceivedMail {
  readonly to: readonly string[];
  readonly subject: string;
  readonly text: string;
  readonly html: string;
  readonly messageId: string;
}

export interface FakeMail {
  readonly url: string;
  /** Messages in the order of arrival. */
  readonly messages: readonly ReceivedMail[];
  /** While set, the server answers each message with this temporary error (SMTP code 451). */
  refuse: string | null;
  readonly stop: () => Promise<void>;
}

/** A mail server that delivers nothing and remembers everything. */
export async function startFakeMail(): Promise<FakeMail> {
  const messages: ReceivedMail[] = [];
  const state: { refuse: string | null } = { refuse: null };
  const server = new SMTPServer({
    authOptional: true,
    disabledCommands: ['STARTTLS'],
    disableReverseLookup: true,
    onData(stream, session, done) {
      simpleParser(stream).then(
        (mail) => {
          if (state.refuse !== null) {
            done(Object.assign(new Error(state.refuse), { responseCode: 451 }));
            return;
          }
          messages.push({
            to: session.envelope.rcptTo.map((recipient) => recipient.address),
            subject: mail.subject ?? '',
            text: mail.text ?? '',
            html: mail.html || '',
            messageId: mail.messageId ?? '',
          });
          done();
        },
        (error: Error) => done(error),
      );
    },
  });
  await new Promise<void>((resolve) => {
    server.listen(0, '127.0.0.1', resolve);
  });
  const address = server.server.address();
  if (address === null || typeof address === 'string') throw new Error('The mail stand-in has no port.');
  return {
    url: `smtp://127.0.0.1:${address.port}`,
    messages,
    get refuse() {
      return state.refuse;
    },
    set refuse(reason) {
      state.refuse = reason;
    },
    stop: () => new Promise((resolve) => server.close(resolve)),
  };
}
