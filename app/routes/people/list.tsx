import { redirect } from 'react-router';
import type { Route } from './+types/list';
import { db } from '#db/client.server.ts';
import { listSiteChoices } from '#db/queries/sites.server.ts';
import { listPeople } from '#db/queries/users.server.ts';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { InviteForm } from '#app/components/people/invite-form.tsx';
import { PersonRow } from '#app/components/people/person-row.tsx';
import { RoleTable } from '#app/components/people/role-table.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { PageTitle, SectionHeading } from '#app/components/ui/page-title.tsx';
import { peopleFormSchema } from '#app/domain/people-form.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addRole, inviteAgain, removeRole, switchAccount } from '#app/services/people/change-access.server.ts';
import { invitePerson } from '#app/services/people/invite-person.server.ts';

export function loader({ context, request }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'people:manage');
    return { ownId: actor.userId, people: await listPeople(db, actor.organisationId), sites: await listSiteChoices(db, actor.organisationId) };
  });
}

export function action({ context, request }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'people:manage');
    const form = await request.formData();
    const parsed = peopleFormSchema.safeParse(Object.fromEntries(form));
    const intent = String(form.get('intent'));
    if (!parsed.success) return formProblem(intent, form, { fieldErrors: fieldErrorsOf(parsed.error) });
    const wanted = parsed.data;
    try {
      if (wanted.intent === 'invite') await invitePerson(actor, wanted);
      else if (wanted.intent === 'add-role') await addRole(actor, { ...wanted, siteId: wanted.siteId === '' ? null : wanted.siteId });
      else if (wanted.intent === 'remove-role') await removeRole(actor, wanted.grantId);
      else if (wanted.intent === 'invite-again') await inviteAgain(actor, wanted.userId);
      else await switchAccount(actor, { userId: wanted.userId, disabled: wanted.intent === 'switch-off', reason: wanted.intent === 'switch-off' ? wanted.reason : '' });
      return redirect('/people');
    } catch (error) {
      return problemFromError(intent, form, error);
    }
  });
}

export const meta: Route.MetaFunction = () => [{ title: 'People and rights · Scorchline' }];

export default function People({ loaderData, actionData }: Route.ComponentProps) {
  const { people, sites, ownId } = loaderData;
  const waiting = people.filter((person) => !person.hasPassword && !person.disabled).length;
  const active = people.filter((person) => !person.disabled).length;
  const elsewhere = actionData && actionData.intent !== 'invite' ? actionData : null;
  return (
    <Page>
      <PageTitle below={waiting === 0 ? 'Nobody has an invitation open.' : `${waiting} ${waiting === 1 ? 'has' : 'have'} not taken up the invitation yet.`} aside={<AppLink href="/log">Whole log</AppLink>}>
        {active === 1 ? 'One person can sign in' : `${active} people can sign in`}
      </PageTitle>
      {elsewhere ? (
        <Notice role="alert" title="Nothing was changed.">{[...elsewhere.formErrors, ...Object.values(elsewhere.fieldErrors).flat()].join(' ')}</Notice>
      ) : null}
      <ul className="border-t-[1.5px] border-ink">
        {people.map((person) => <PersonRow key={person.userId} person={person} sites={sites} isSelf={person.userId === ownId} />)}
      </ul>
      <section aria-labelledby="invite-heading" className="max-w-[720px] pt-10">
        <SectionHeading id="invite-heading">Invite a person</SectionHeading>
        <InviteForm sites={sites} problem={actionData?.intent === 'invite' ? actionData : null} />
      </section>
      <section aria-labelledby="rights-heading" className="pt-10">
        <SectionHeading id="rights-heading">What each role may do</SectionHeading>
        <RoleTable />
      </section>
    </Page>
  );
}
