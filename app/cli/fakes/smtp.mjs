/**
 * A local stand-in for a mail server: it delivers nothing and stores each message as two files, `<id>.eml` as received
 * and `<id>.json` for reading. Settings come as arguments: port, folder.
 */
import { randomUUID } from 'node:crypto';
import { mkdir, rename, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { simpleParser } from 'mailparser';
import { SMTPServer } from 'smtp-server';

const [port, folder] = process.argv.slice(2);
if (!port || !folder) throw new Error('Usage: smtp.mjs <port> <folder>');
await mkdir(folder, { recursive: true, mode: 0o700 });

const server = new SMTPServer({
  authOptional: true,
  disabledCommands: ['STARTTLS'],
  disableReverseLookup: true,
  onData(stream, session, done) {
    store(stream, session).then(
      () => done(),
      (error) => {
        console.error(error);
        done(error);
      },
    );
  },
});

async function store(stream, session) {
  const chunks = [];
  for await (const chunk of stream) chunks.push(chunk);
  const source = Buffer.concat(chunks);
  const message = await simpleParser(source);
  const receivedAt = new Date().toISOString();
  const id = `${receivedAt.replaceAll(/[:.]/g, '-')}-${randomUUID().slice(0, 8)}`;
  const entry = {
    id,
    receivedAt,
    envelopeFrom: session.envelope.mailFrom ? session.envelope.mailFrom.address : null,
    envelopeTo: session.envelope.rcptTo.map((recipient) => recipient.address),
    from: message.from?.text ?? '',
    to: [message.to].flat().filter(Boolean).map((address) => address.text).join(', '),
    subject: message.subject ?? '',
    messageId: message.messageId ?? null,
    text: message.text ?? '',
    html: message.html || null,
    attachments: message.attachments.map(({ filename, contentType, size }) => ({ filename: filename ?? null, contentType, sizeBytes: size })),
  };
  await writeFile(join(folder, `${id}.eml`), source, { mode: 0o600 });
  // The list is read while mail arrives: a reader must never see half an entry.
  const unfinished = join(folder, `.${id}.json`);
  await writeFile(unfinished, JSON.stringify(entry, null, 2), { mode: 0o600 });
  await rename(unfinished, join(folder, `${id}.json`));
}

server.on('error', (error) => {
  console.error(error.message);
  if (!server.server.listening) process.exit(1);
});
server.listen(Number(port), '127.0.0.1', () => console.log(`Mail stand-in on port ${port}, messages in ${folder}`));

for (const signal of ['SIGTERM', 'SIGINT']) process.once(signal, () => process.exit(0));
