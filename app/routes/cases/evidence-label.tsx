import { href } from 'react-router';
import type { Route } from './+types/evidence-label';
import { db } from '#db/client.server.ts';
import { getItemPage } from '#db/queries/evidence-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { Page } from '#app/components/layout/page.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { notFound } from '#app/domain/errors.ts';
import { readItemLetter } from '#app/domain/evidence.ts';
import { respond } from '#app/http/to-response.server.ts';
import { labelCode } from '#app/services/evidence/label-code.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const page = await getItemPage(db, { actor, caseNumber: readCaseNumber(params.caseNumber), label: readItemLetter(params.letter), now: new Date() });
    if (!page) throw notFound('The item');
    const { code, description, sealWords, fromWhere, collected } = page.item;
    return { code, description, sealWords, fromWhere, collected, qr: labelCode(href('/cases/:caseNumber/evidence/:letter', params)) };
  });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Label ${params.caseNumber}-${params.letter} · Scorchline` }];

/** A label of 100 by 62 mm: number, seal, and a code that leads to the custody page. No personal words on its front but who collected it. */
export default function EvidenceLabel({ loaderData: label, params }: Route.ComponentProps) {
  return (
    <Page>
      <div className="space-y-2 py-4" data-print="no">
        <h1 className="font-serif text-title">Label for {label.code}</h1>
        <p><AppLink href={href('/cases/:caseNumber/evidence/:letter', params)} className="inline-flex min-h-(--target-height) items-center">Back to the item</AppLink></p>
        <p className="max-w-[64ch] text-second">Print this page with the print command of the browser, without scaling. The label is 100 mm wide. Fix it to the bag or the seal, never to the item.</p>
      </div>
      <div data-print="alone" className="w-full max-w-[100mm] border-2 border-ink bg-white p-[4mm] text-[#1c2430]">
        <div className="flex justify-between gap-[4mm]">
          <div className="min-w-0">
            <p className="font-serif text-[1.75rem] leading-8 font-semibold">{label.code}</p>
            <p className="pt-1 text-[0.875rem] leading-5">{label.description}</p>
          </div>
          <svg viewBox={`-4 -4 ${label.qr.size + 8} ${label.qr.size + 8}`} className="h-[30mm] w-[30mm] flex-none" role="img" aria-label={`Code that leads to ${label.qr.url}`} shapeRendering="crispEdges">
            <rect x="-4" y="-4" width={label.qr.size + 8} height={label.qr.size + 8} fill="#ffffff" />
            <path d={label.qr.path} fill="#000000" />
          </svg>
        </div>
        <dl className="mt-[2mm] border-t-[1.5px] border-[#1c2430] text-[0.75rem] leading-4">
          {([['Seal', label.sealWords.replace(/^seal /u, '')], ['From', label.fromWhere], ['Collected', label.collected]] as const).map(([term, value]) => (
            <div key={term} className="flex gap-2 border-b border-[#d5ccba] py-[1mm]">
              <dt className="w-[18mm] flex-none font-semibold">{term}</dt>
              <dd className="min-w-0 break-words">{value}</dd>
            </div>
          ))}
        </dl>
        <p className="pt-[1mm] text-[0.75rem] leading-4 break-all">{label.qr.url}</p>
        <p className="pt-[1mm] text-[0.75rem] leading-4 font-semibold">Do not open, clean or throw away. Sign each hand-over.</p>
      </div>
    </Page>
  );
}
