import { z } from 'zod';
import type { Route } from './+types/site-plan';
import { requireActorWho } from '#app/auth/middleware.server.ts';
import { notFound } from '#app/domain/errors.ts';
import { respond } from '#app/http/to-response.server.ts';
import { getObject } from '#app/storage/objects.server.ts';
import { db } from '#db/client.server.ts';
import { findSitePlan } from '#db/queries/site-plans.server.ts';

/** A drawing of a site, for people of its organisation who may read sites. Guests are told no position and see no drawing. */
export function loader({ request, params, context }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActorWho(context, request, 'site:read');
    const planId = z.uuid().safeParse(params.planId).data;
    const plan = planId ? await findSitePlan(db, { planId, organisationId: actor.organisationId }) : null;
    const bytes = plan ? await getObject(plan.pictureKey) : null;
    if (!bytes) throw notFound('The drawing');
    return new Response(new Uint8Array(bytes), {
      headers: {
        'Content-Type': 'image/png',
        'Content-Length': String(bytes.byteLength),
        // The picture under an address never changes; who may see it does.
        'Cache-Control': 'private, max-age=3600',
        'X-Content-Type-Options': 'nosniff',
        'Cross-Origin-Resource-Policy': 'same-origin',
      },
    });
  });
}
