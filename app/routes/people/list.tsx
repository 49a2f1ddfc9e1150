import { redirect } from 'react-router';
import type { Route } from './+types/list';
import { db } from '#db/client.server.ts';
import { listSiteChoices } from '#db/queries/sites.server.ts';
import { listLeavers, listPeople } from '#db/queries/users.server.ts';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { InviteForm } from '#app/components/people/invite-form.tsx';
import { PersonRow } from '#app/components/people/person-row.tsx';
import { RoleTable } from '#app/components/people/role-table.tsx';
import { Leavers } from '#app/components/people/leavers.tsx';
import { Columns, Page } from '#app/components/layout/page.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { PageTitle, SectionHeading } from '#app/components/ui/page-title.tsx';
import { isRole } from '#app/domain/role-table.ts';
import { peopleFormSchema } from '#app/domain/people-form.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addRole, inviteAgain, removeRole, switchAccount } from '#app/services/people/change-access.server.ts';
import { invitePerson } from '#app/services/people/invite-person.server.ts';

export function loader({ context, request }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'people:manage');
    const asked = new URL(request.url).searchParams.get('role');
    return {
      ownId: actor.userId,
      chosenRole: isRole(asked) ? asked : ('investigator' as const),
      people: await listPeople(db, actor.organisationId),
      leavers: await listLeavers(db, actor.organisationId),
      sites: await listSiteChoices(db, actor.organisationId),
    };
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

/** The finding of the page: what an administrator should look at first. */
function finding(people: readonly { readonly hasPassword: boolean; readonly disabled: boolean }[], leavers: number): { title: string; below: string } {
  const active = people.filter((person) => !person.disabled);
  const waiting = active.filter((person) => !person.hasPassword).length;
  const canSignIn = active.length - waiting;
  const below = `${canSignIn === 1 ? 'One person' : `${canSignIn} people`} can sign in. ${waiting === 0 ? 'No invitation is open.' : waiting === 1 ? 'One has not taken up the invitation yet.' : `${waiting} have not taken up the invitation yet.`}`;
  if (leavers > 0) return { title: leavers === 1 ? 'One person has left and still holds work' : `${leavers} people have left and still hold work`, below };
  if (waiting > 0) return { title: waiting === 1 ? 'One invitation is still open' : `${waiting} invitations are still open`, below };
  return { title: 'Everyone invited can sign in', below };
}

export default function People({ loaderData, actionData }: Route.ComponentProps) {
  const { people, sites, ownId, leavers, chosenRole } = loaderData;
  const { title, below } = finding(people, leavers.length);
  const trouble = actionData ?? null;
  const isNamed = people.some((person) => person.userId === trouble?.typed.userId);
  return (
    <Page>
      <PageTitle below={below} aside={<><ButtonLink look="outlined" href="/log">Whole log</ButtonLink><ButtonLink href="#invite-heading">Invite a person</ButtonLink></>}>
        {title}
      </PageTitle>
      {trouble && trouble.intent !== 'invite' && !isNamed ? (
        <Notice role="alert" title="Nothing was changed.">{[...trouble.formErrors, ...Object.values(trouble.fieldErrors).flat()].join(' ')}</Notice>
      ) : null}
      <Columns sideLabel="Leavers" side={<Leavers leavers={leavers} />}>
        <section aria-labelledby="people-heading">
          <SectionHeading id="people-heading" note="by name">People and their roles</SectionHeading>
          <ul className="border-t border-hair">
            {people.map((person) => (
              <PersonRow key={person.userId} person={person} sites={sites} isSelf={person.userId === ownId} trouble={trouble?.typed.userId === person.userId ? trouble : null} />
            ))}
          </ul>
        </section>
        <section aria-labelledby="invite-heading" className="max-w-[720px] pt-10">
          <SectionHeading id="invite-heading">Invite a person</SectionHeading>
          {/* A new list means that the last invitation went out: the form starts afresh. */}
          <InviteForm key={people.length} sites={sites} problem={trouble?.intent === 'invite' ? trouble : null} />
        </section>
      </Columns>
      <section aria-labelledby="rights-heading" className="pt-10">
        <SectionHeading id="rights-heading" note="as the server applies it; choose a role to read what it means">What each role may do</SectionHeading>
        <RoleTable chosen={chosenRole} />
      </section>
    </Page>
  );
}
