import { Form, href, redirect } from 'react-router';
import { z } from 'zod';
import type { Route } from './+types/plan';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { Page } from '#app/components/layout/page.tsx';
import { KnownPointsForm } from '#app/components/sites/known-points-form.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { PageTitle } from '#app/components/ui/page-title.tsx';
import { placeText } from '#app/domain/coordinate-text.ts';
import { notFound } from '#app/domain/errors.ts';
import { holdsRole } from '#app/domain/roles.ts';
import { placePlan, placementWords } from '#app/domain/site-plan.ts';
import { pointFields } from '#app/domain/site-plan-form.ts';
import { formProblem, problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { placeSitePlan, removeSitePlan } from '#app/services/sites/site-plans.server.ts';
import { db } from '#db/client.server.ts';
import { findSitePlan } from '#db/queries/site-plans.server.ts';
import { getSiteByCode } from '#db/queries/sites.server.ts';

const planIdOf = (text: string) => {
  const planId = z.uuid().safeParse(text).data;
  if (!planId) throw notFound('The drawing');
  return planId;
};

export function loader({ context, request, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:read');
    const site = await getSiteByCode(db, actor.organisationId, params.siteCode);
    const plan = site ? await findSitePlan(db, { planId: planIdOf(params.planId), organisationId: actor.organisationId }) : null;
    if (!site || plan?.siteId !== site.id || plan.removedAt) throw notFound('The drawing');
    const placement = placePlan(plan, plan.points);
    const stored = plan.points.flatMap((point, index) => {
      const names = pointFields(index + 1);
      return [[names.name, point.name], [names.x, String(point.xPx)], [names.y, String(point.yPx)], [names.place, placeText(point)]];
    });
    return {
      code: site.code,
      siteName: site.name,
      mayManage: holdsRole(actor, ['administrator', 'manager'], site.id),
      name: plan.name,
      address: `/site-plans/${plan.id}`,
      widthPx: plan.widthPx,
      heightPx: plan.heightPx,
      words: placement ? placementWords(placement) : null,
      stored: Object.fromEntries(stored) as Record<string, string>,
    };
  });
}

export function action({ context, request, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:manage');
    const planId = planIdOf(params.planId);
    const form = await request.formData();
    const typed = typedValues(form);
    try {
      if (typed['intent'] === 'remove-plan') {
        await removeSitePlan({ actor, siteCode: params.siteCode, planId, now: new Date() });
        return redirect(href('/sites/:siteCode/plans', { siteCode: params.siteCode }), 303);
      }
      const reading = await placeSitePlan({ actor, siteCode: params.siteCode, planId, typed });
      if (!reading.ok) return formProblem('place-plan', form, reading);
      return redirect(href('/sites/:siteCode/plans/:planId', { siteCode: params.siteCode, planId }), 303);
    } catch (error) {
      return problemFromError('place-plan', form, error);
    }
  });
}

export const meta: Route.MetaFunction = ({ loaderData }) => [{ title: `${loaderData?.name ?? 'Drawing'} · Scorchline` }];

export default function SitePlan({ loaderData: plan, actionData }: Route.ComponentProps) {
  return (
    <Page>
      <PageTitle below={<><AppLink href={href('/sites/:siteCode/plans', { siteCode: plan.code })}>Drawings of {plan.siteName}</AppLink></>}>
        {plan.words === null ? `“${plan.name}” lies on no map yet` : `“${plan.name}” lies on the map`}
      </PageTitle>
      {plan.words ? <p className="pb-3">{plan.words}</p> : null}
      {plan.mayManage ? (
        <>
          <KnownPointsForm plan={plan} typed={actionData?.typed ?? plan.stored} formErrors={actionData?.formErrors ?? []} fieldErrors={actionData?.fieldErrors ?? {}} />
          <Form method="post" className="pt-8">
            <input type="hidden" name="intent" value="remove-plan" />
            <Button look="quiet" className="min-h-11">Take this drawing off the maps</Button>
          </Form>
        </>
      ) : <img src={plan.address} width={plan.widthPx} height={plan.heightPx} alt={`Drawing: ${plan.name}`} className="h-auto max-w-full border border-edge bg-white" />}
    </Page>
  );
}
