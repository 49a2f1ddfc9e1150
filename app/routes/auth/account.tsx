import { data, Form, redirect } from 'react-router';
import type { Route } from './+types/account';
import { db } from '#db/client.server.ts';
import { listApiTokens } from '#db/queries/api-tokens.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { fieldErrorsOf } from '#app/http/field-errors.ts';
import { formProblem, problemFromError } from '#app/http/form-result.server.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { ApiKeys } from '#app/components/people/api-keys.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { ChipGroup } from '#app/components/ui/chip-group.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import { PageTitle, SectionHeading } from '#app/components/ui/page-title.tsx';
import { accountSchema, shortestPassword } from '#app/domain/account.ts';
import { formatDay } from '#app/domain/local-time.ts';
import { canInOrganisation } from '#app/domain/permissions.ts';
import { roleLabels } from '#app/domain/roles.ts';
import { makeApiToken, revokeToken } from '#app/services/people/api-tokens.server.ts';
import { changePassword, changeUnits, signOutEverywhere } from '#app/services/people/own-account.server.ts';

export async function loader({ context, request }: Route.LoaderArgs) {
  const actor = requireActor(context, request);
  const day = (at: Date) => `${formatDay(at, 'UTC')} UTC`;
  const tokens = canInOrganisation(actor, 'register:read') ? await listApiTokens(db, actor.userId) : null;
  return {
    name: actor.displayName,
    email: actor.email,
    units: actor.units,
    roles: [...new Set(actor.grants.map((grant) => roleLabels[grant.role]))],
    keys: tokens?.map(({ id, name, scope, ...at }) => ({ id, name, scope, madeOn: day(at.createdAt), endsOn: day(at.expiresAt), usedOn: at.lastUsedAt && day(at.lastUsedAt) })) ?? null,
  };
}

export async function action({ context, request }: Route.ActionArgs) {
  const actor = requireActor(context, request);
  const form = await request.formData();
  const parsed = accountSchema.safeParse(Object.fromEntries(form));
  if (!parsed.success) return formProblem(String(form.get('intent')), form, { fieldErrors: fieldErrorsOf(parsed.error) });
  try {
    switch (parsed.data.intent) {
      case 'change-password':
        return data({ ok: true as const, said: 'The password is changed. Every other device is signed out.' }, { headers: { 'Set-Cookie': await changePassword(actor, parsed.data) } });
      case 'change-units':
        await changeUnits(actor, parsed.data.units);
        return { ok: true as const, said: 'The units are changed.' };
      case 'make-token':
        return { ok: true as const, said: 'The key is made.', token: await makeApiToken(actor, { name: parsed.data.name, scope: parsed.data.scope, days: Number(parsed.data.days) }) };
      case 'revoke-token':
        await revokeToken(actor, parsed.data.tokenId);
        return { ok: true as const, said: 'The key is ended. Whatever uses it is refused from now on.' };
      case 'sign-out-everywhere':
        return redirect('/', { headers: { 'Set-Cookie': await signOutEverywhere(actor) } });
    }
  } catch (error) {
    return problemFromError(parsed.data.intent, form, error);
  }
}

export const meta: Route.MetaFunction = () => [{ title: 'Your account · Scorchline' }];

export default function Account({ loaderData, actionData }: Route.ComponentProps) {
  const problem = actionData && !actionData.ok ? actionData : null;
  const current = { name: 'currentPassword', errors: problem?.fieldErrors.currentPassword ?? [], required: true };
  const next = { name: 'password', errors: problem?.fieldErrors.password ?? [], required: true };
  return (
    <Page width="reading">
      <PageTitle below={[loaderData.email, ...loaderData.roles].join(', ')}>{loaderData.name}</PageTitle>
      {actionData?.ok ? <Notice role="status">{actionData.said}</Notice> : null}
      <section aria-labelledby="units-heading" className="pt-6">
        <SectionHeading id="units-heading">Units</SectionHeading>
        <Form method="post" className="flex flex-wrap items-center gap-4 pt-3">
          <input type="hidden" name="intent" value="change-units" />
          <fieldset>
            <legend className="sr-only">Units on screen</legend>
            <ChipGroup name="units" options={[{ value: 'metric', label: 'Metric' }, { value: 'us', label: 'US' }]} chosen={[loaderData.units]} />
          </fieldset>
          <Button look="outlined">Save the units</Button>
        </Form>
      </section>
      <section aria-labelledby="password-heading" className="pt-8">
        <SectionHeading id="password-heading">Password</SectionHeading>
        <Form method="post" className="space-y-4 pt-3" noValidate>
          <ErrorSummary errors={problem?.formErrors ?? []} fields={[{ field: current, label: 'Password now' }, { field: next, label: 'New password' }]} title="The password is not changed." />
          <input type="hidden" name="intent" value="change-password" />
          <input type="text" name="username" value={loaderData.email} readOnly autoComplete="username" hidden />
          <TextInput field={current} label="Password now" type="password" autoComplete="current-password" />
          <TextInput field={next} label="New password" type="password" autoComplete="new-password" help={`At least ${shortestPassword} characters.`} />
          <Button look="outlined">Change the password</Button>
        </Form>
      </section>
      <section aria-labelledby="devices-heading" className="pt-8">
        <SectionHeading id="devices-heading">Devices</SectionHeading>
        <p className="pt-3">Lost a phone, or signed in on a machine that is not yours?</p>
        <Form method="post" className="pt-3">
          <input type="hidden" name="intent" value="sign-out-everywhere" />
          <Button look="outlined">Sign out everywhere</Button>
        </Form>
      </section>
      {loaderData.keys ? (
        <ApiKeys keys={loaderData.keys} made={actionData?.ok && 'token' in actionData ? (actionData.token ?? null) : null} problem={problem?.intent === 'make-token' ? problem : null} />
      ) : null}
    </Page>
  );
}
