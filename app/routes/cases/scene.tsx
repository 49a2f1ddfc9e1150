import type { Route } from './+types/scene';
import { db } from '#db/client.server.ts';
import { getMeasuredCase } from '#db/queries/measure-pages.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { MeasureNav } from '#app/components/cases/measure-nav.tsx';
import { SceneEditor } from '#app/components/scene/scene-editor.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { formatDayClock, fromLocalInput, localDay } from '#app/domain/local-time.ts';
import { sceneToFields } from '#app/domain/scene-form-fields.ts';
import { weatherWindow } from '#app/domain/weather-window.ts';
import { respond } from '#app/http/to-response.server.ts';
import { saveScene } from '#app/services/scenes/save-scene.server.ts';
import { saveVersion } from './save-version.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const { row, place, scene, version, mayEdit, whoEdits } = await getMeasuredCase(db, { actor, caseNumber });
    const span = drawnSpan(weatherWindow(row), row.zone, new Date());
    return {
      caseNumber,
      stored: sceneToFields(scene),
      scene,
      siteSkyline: place.skyline,
      place: { latitudeDeg: place.latitudeDeg, longitudeDeg: place.longitudeDeg, elevationM: place.elevationM, zone: place.zone },
      span,
      version,
      mayEdit,
      whoEdits,
    };
  });
}

/** The onset window, at most its last day; without one, today from 04:00 to 22:00. */
function drawnSpan(window: { readonly from: Date; readonly to: Date } | null, zone: string, now: Date) {
  const dayMs = 86_400_000;
  if (window) {
    const from = new Date(Math.max(window.from.getTime(), window.to.getTime() - dayMs));
    const cut = from > window.from ? ' Last day of the onset window.' : ' The onset window.';
    return { fromUtc: from.toISOString(), toUtc: window.to.toISOString(), words: `${formatDayClock(from, zone)} to ${formatDayClock(window.to, zone)}.${cut}` };
  }
  const at = (clock: string) => {
    const reading = fromLocalInput(`${localDay(now, zone)}T${clock}`, zone, 'first');
    return reading.kind === 'instant' ? reading.instant : now;
  };
  return { fromUtc: at('04:00').toISOString(), toUtc: at('22:00').toISOString(), words: 'Today: no onset window is known yet.' };
}

export const action = (args: Route.ActionArgs) => saveVersion(args, 'save-scene', saveScene);

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, plan and section · Scorchline` }];

export default function ScenePage({ loaderData: data, actionData: problem }: Route.ComponentProps) {
  return (
    <>
      <MeasureNav caseNumber={data.caseNumber} current="scene" />
      <SceneEditor key={data.version} stored={data.stored} scene={data.scene} siteSkyline={data.siteSkyline} place={data.place} span={data.span} baseVersion={data.version} mayEdit={data.mayEdit} whoEdits={data.whoEdits} problem={problem} />
    </>
  );
}
