import { href } from 'react-router';
import type { Route } from './+types/mailbox';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { Page } from '#app/components/layout/page.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { notFound } from '#app/domain/errors.ts';
import { respond } from '#app/http/to-response.server.ts';
import { listMailbox, mailboxFolder } from '#app/storage/mailbox.server.ts';

/** Letters hold links that open accounts, so the stand-in's mailbox is for administrators, and only where it exists. */
export function loader({ context, request }: Route.LoaderArgs) {
  return respond(async () => {
    requireActorWho(context, request, 'people:manage');
    const folder = mailboxFolder();
    if (!folder) throw notFound('A mail stand-in');
    return { messages: (await listMailbox(folder)).map(({ id, receivedAt, to, subject }) => ({ id, receivedAt, to, subject })) };
  });
}

export const meta: Route.MetaFunction = () => [{ title: 'Mailbox of the stand-in · Scorchline' }];

export default function Mailbox({ loaderData }: Route.ComponentProps) {
  const { messages } = loaderData;
  return (
    <Page>
      <PageTitle below="Nothing of this left the machine.">
        {messages.length === 0 ? 'No mail has been sent' : `${messages.length} ${messages.length === 1 ? 'message' : 'messages'} of the mail stand-in`}
      </PageTitle>
      <DataTable caption="Messages, newest first">
        <TableHead>
          <HeadCell>Received, UTC</HeadCell>
          <HeadCell>To</HeadCell>
          <HeadCell>Subject</HeadCell>
        </TableHead>
        <tbody>
          {messages.map((message) => (
            <Row key={message.id}>
              <Cell>{message.receivedAt.slice(0, 19).replace('T', ' ')}</Cell>
              <Cell>{message.to}</Cell>
              <Cell>
                <AppLink href={href('/development/mailbox/:messageId', { messageId: message.id })}>{message.subject}</AppLink>
              </Cell>
            </Row>
          ))}
        </tbody>
      </DataTable>
    </Page>
  );
}
