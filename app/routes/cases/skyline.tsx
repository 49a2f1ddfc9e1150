import type { Route } from './+types/skyline';
import { db } from '#db/client.server.ts';
import { getMeasuredCase } from '#db/queries/measure-pages.server.ts';
import { listCasePhotos } from '#db/queries/photos.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { MeasureNav } from '#app/components/cases/measure-nav.tsx';
import { SkylineEditor } from '#app/components/scene/skyline-editor.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { localDay } from '#app/domain/local-time.ts';
import { skylineFinding } from '#app/domain/measurements-view.ts';
import { photoCard } from '#app/domain/photo-view.ts';
import { skylineRows } from '#app/domain/skyline-form.ts';
import { sunLine, turningDays } from '#app/domain/sun-lines.ts';
import { weatherWindow } from '#app/domain/weather-window.ts';
import { respond } from '#app/http/to-response.server.ts';
import { saveCaseSkyline } from '#app/services/scenes/save-skyline.server.ts';
import { saveVersion } from './save-version.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const { row, place, scene, version, mayEdit, whoEdits } = await getMeasuredCase(db, { actor, caseNumber });
    const day = localDay(weatherWindow(row)?.to ?? new Date(), row.zone);
    const photos = (await listCasePhotos(db, { actor, caseNumber })).map((photo) => ({ card: photoCard(photo, row), view: photo.view })).filter(({ card }) => card.state === 'ready');
    // Panoramas and skylines first: the others are seldom taken from the optic.
    const first = photos.toSorted((a, b) => Number(b.view === 'panorama' || b.view === 'skyline') - Number(a.view === 'panorama' || a.view === 'skyline'));
    return {
      caseNumber,
      version,
      mayEdit,
      whoEdits,
      finding: skylineFinding(scene.skyline, place.skyline),
      rows: skylineRows(scene.skyline ?? place.skyline),
      fromSite: !scene.skyline && place.skyline !== null,
      paths: [sunLine(day, place), ...turningDays(day.slice(0, 4)).map(([on, label]) => sunLine(on, place, label))],
      photos: first.map(({ card }) => ({ id: card.id, label: `${caseNumber}-${card.label} ${card.viewWords}`, alt: card.alternative })),
    };
  });
}

export const action = (args: Route.ActionArgs) => saveVersion(args, 'save-skyline', saveCaseSkyline);

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, skyline · Scorchline` }];

export default function CaseSkyline({ loaderData: data, actionData: problem }: Route.ComponentProps) {
  return (
    <>
      <MeasureNav caseNumber={data.caseNumber} current="skyline" />
      <h2 className="font-serif text-title">{data.finding.heading}</h2>
      <p className="max-w-[64ch] pb-4 text-second">{data.finding.words}{data.fromSite && data.mayEdit ? ' Saved here, they become the case’s own.' : ''}</p>
      <SkylineEditor key={data.version} rows={data.rows} paths={data.paths} photos={data.photos} base={{ name: 'baseVersion', value: String(data.version) }} saveLabel={`Save as version ${data.version + 1} of the measurements`} mayEdit={data.mayEdit} whoEdits={data.whoEdits} problem={problem} />
    </>
  );
}
