import type { Route } from './+types/mailbox-message';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { Page } from '#app/components/layout/page.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { notFound } from '#app/domain/errors.ts';
import { respond } from '#app/http/to-response.server.ts';
import { mailboxFolder, readEntry } from '#app/storage/mailbox.server.ts';

export function loader({ context, request, params }: Route.LoaderArgs) {
  return respond(async () => {
    requireActorWho(context, request, 'people:manage');
    const folder = mailboxFolder();
    const message = folder ? await readEntry(folder, params.messageId) : null;
    if (!message) throw notFound('The message');
    return { message };
  });
}

export const meta: Route.MetaFunction = () => [{ title: 'Message · Scorchline' }];

const linkPattern = /(https?:\/\/\S+)/u;

export default function MailboxMessage({ loaderData }: Route.ComponentProps) {
  const { message } = loaderData;
  return (
    <Page width="reading">
      <p className="pt-5 text-small">
        <AppLink href="/development/mailbox">All messages</AppLink>
      </p>
      <PageTitle below={`To ${message.to}, from ${message.from}, ${message.receivedAt.slice(0, 19).replace('T', ' ')} UTC`}>{message.subject}</PageTitle>
      <div className="border-t border-hair pt-4 whitespace-pre-line">
        {message.text.split(linkPattern).map((piece, index) => (linkPattern.test(piece) ? <a key={index} href={piece} className="break-all">{piece}</a> : piece))}
      </div>
    </Page>
  );
}
