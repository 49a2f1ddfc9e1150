import { Form, href, redirect } from 'react-router';
import type { Route } from './+types/plans';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { Field } from '#app/components/forms/field.tsx';
import { describedBy, fieldIds, hasErrors } from '#app/components/forms/field-like.ts';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Page } from '#app/components/layout/page.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { PageTitle, SectionHeading } from '#app/components/ui/page-title.tsx';
import { notFound } from '#app/domain/errors.ts';
import { holdsRole } from '#app/domain/roles.ts';
import { placePlan, placementWords } from '#app/domain/site-plan.ts';
import { problemFromError } from '#app/http/form-result.server.ts';
import { readForm } from '#app/http/multipart-form.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addSitePlan } from '#app/services/sites/site-plans.server.ts';
import type { IncomingFile } from '#app/storage/photo-intake.server.ts';
import { db } from '#db/client.server.ts';
import { listSitePlans } from '#db/queries/site-plans.server.ts';
import { getSiteByCode } from '#db/queries/sites.server.ts';

export function loader({ context, request, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:read');
    const site = await getSiteByCode(db, actor.organisationId, params.siteCode);
    if (!site) throw notFound('The site');
    const plans = await listSitePlans(db, site.id);
    return {
      code: site.code,
      name: site.name,
      mayManage: holdsRole(actor, ['administrator', 'manager'], site.id),
      plans: plans.map((plan) => {
        const placement = placePlan(plan, plan.points);
        return { id: plan.id, name: plan.name, words: placement ? placementWords(placement) : null };
      }),
    };
  });
}

export function action({ context, request, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:manage');
    const files: IncomingFile[] = [];
    const form = await readForm(request, ({ fieldName, name, bytes }) => {
      if (fieldName === 'picture') files.push({ name, bytes });
      return Promise.resolve();
    });
    try {
      const planId = await addSitePlan({ actor, siteCode: params.siteCode, name: String(form.get('name') ?? ''), file: files[0] ?? null });
      return redirect(href('/sites/:siteCode/plans/:planId', { siteCode: params.siteCode, planId }), 303);
    } catch (error) {
      return problemFromError('add-plan', form, error);
    }
  });
}

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `Drawings of ${loaderData?.name ?? 'a site'} · Scorchline` }];

export default function SitePlans({ loaderData: { code, name, mayManage, plans }, actionData }: Route.ComponentProps) {
  const field = (field: string) => ({ name: field, id: `plan-${field}`, defaultValue: actionData?.typed[field] ?? '', errors: actionData?.fieldErrors[field] ?? [] });
  const placed = plans.filter(({ words }) => words !== null).length;
  return (
    <Page width="reading">
      <PageTitle below={<AppLink href={href('/sites/:siteCode', { siteCode: code })}>{name}</AppLink>}>
        {placed === 0 ? 'No drawing of this site lies on the map yet' : placed === 1 ? 'One drawing of this site lies on the map' : `${placed} drawings of this site lie on the map`}
      </PageTitle>
      <p className="pb-4">A drawing shows people on the roof where they are. It lies under the pins of a report when two points or more are known on it and on the ground.</p>
      <ul>
        {plans.map((plan) => (
          <li key={plan.id} className="border-b border-hair py-2">
            <AppLink href={href('/sites/:siteCode/plans/:planId', { siteCode: code, planId: plan.id })} className="inline-flex min-h-11 items-center font-semibold">{plan.name}</AppLink>
            <span className="block text-small text-second">{plan.words ?? 'Not placed yet: it lies on no map.'}</span>
          </li>
        ))}
      </ul>
      {mayManage ? (
        <section aria-labelledby="add-plan" className="pt-8">
          <SectionHeading id="add-plan">Add a drawing</SectionHeading>
          <Form method="post" encType="multipart/form-data" className="space-y-4 pt-2" noValidate>
            <ErrorSummary errors={actionData?.formErrors ?? []} fields={[{ field: field('name'), label: 'What it shows' }, { field: field('picture'), label: 'Picture' }]} />
            <TextInput field={field('name')} label="What it shows" help="Such as Roof, or Floor 4." maxLength={60} autoComplete="off" />
            <PictureInput field={field('picture')} />
            <Button look="outlined">Add the drawing</Button>
          </Form>
        </section>
      ) : null}
    </Page>
  );
}

function PictureInput({ field }: { readonly field: Parameters<typeof fieldIds>[0] }) {
  return (
    <Field field={field} label="Picture" help="PNG, JPEG or WebP, seen straight from above. A page of a drawing saved as a picture will do.">
      <input type="file" id={fieldIds(field).id} name={field.name} accept="image/png,image/jpeg,image/webp" className="field-box" aria-invalid={hasErrors(field) || undefined} aria-describedby={describedBy(field, true)} />
    </Field>
  );
}
