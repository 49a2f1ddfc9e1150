import { href } from 'react-router';
import type { Route } from './+types/measurements';
import { db } from '#db/client.server.ts';
import { getMeasuredCase } from '#db/queries/measure-pages.server.ts';
import { listSceneVersions } from '#db/queries/scenes.server.ts';
import { standingWeather } from '#db/queries/weather.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { MeasureNav } from '#app/components/cases/measure-nav.tsx';
import { SceneForm } from '#app/components/cases/scene-form.tsx';
import { TakeAlong } from '#app/components/cases/take-along.tsx';
import { Columns } from '#app/components/layout/page.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { formatDayClock, localDay } from '#app/domain/local-time.ts';
import { declinationWords, measuredHeading, sceneStamps, skylineWords } from '#app/domain/measurements-view.ts';
import { sceneToFields } from '#app/domain/scene-form-fields.ts';
import { sceneFacts } from '#app/domain/scene-words.ts';
import { respond } from '#app/http/to-response.server.ts';
import { declinationAt } from '#app/services/scenes/declination.server.ts';
import { saveScene } from '#app/services/scenes/save-scene.server.ts';
import { saveVersion } from './save-version.server.ts';

export async function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const { row, place, scene, version, mayEdit, whoEdits } = await getMeasuredCase(db, { actor, caseNumber });
    const now = new Date();
    const versions = await listSceneVersions(db, { actor, caseNumber });
    const weather = await standingWeather(db, row.id);
    const { declinationDeg, declinationSource } = declinationAt(place, now);
    return {
      madeAt: now.toISOString(),
      caseNumber,
      mayEdit,
      whoEdits,
      kind: scene.optic.kind,
      heading: measuredHeading(scene),
      stored: sceneToFields(scene),
      stamps: sceneStamps(scene),
      facts: sceneFacts(scene),
      baseVersion: version,
      storageKey: `scorchline.measurements.${actor.userId}.${caseNumber}`,
      measurer: actor.displayName,
      north: {
        today: localDay(now, row.zone),
        declinationDeg,
        declinationWords: declinationWords(declinationDeg, declinationSource),
        place: { latitudeDeg: place.latitudeDeg, longitudeDeg: place.longitudeDeg, elevationM: place.elevationM, zone: place.zone },
      },
      around: {
        skyline: skylineWords(scene.skyline, place.skyline),
        weather: weather.length === 0 ? 'No weather is on record.' : `Weather: ${weather.length === 1 ? 'one record' : `${weather.length} records`}.`,
      },
      versions: versions.map((line) => ({ number: line.version, meta: `${formatDayClock(line.createdAt, row.zone)}, ${line.authorName ?? 'with the report'}`, note: line.note })),
    };
  });
}

export const action = (args: Route.ActionArgs) => saveVersion(args, 'save-scene', saveScene);

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, measurements · Scorchline` }];

export default function Measurements({ loaderData: data, actionData: problem }: Route.ComponentProps) {
  return (
    <>
      <MeasureNav caseNumber={data.caseNumber} current="measurements" />
      <h2 className="pb-4 font-serif text-title">{data.heading}</h2>
      <Columns sideLabel="Versions" side={<Versions versions={data.versions} />}>
        {data.mayEdit ? <TakeAlong address={href('/cases/:caseNumber/measurements', { caseNumber: String(data.caseNumber) })} madeAt={data.madeAt} /> : null}
        {data.mayEdit ? (
          <SceneForm key={data.baseVersion} kind={data.kind} stored={data.stored} stamps={data.stamps} baseVersion={data.baseVersion} storageKey={data.storageKey} measurer={data.measurer} north={data.north} around={data.around} problem={problem} />
        ) : (
          <section aria-labelledby="measured-heading" className="max-w-[48rem]">
            <SectionHeading id="measured-heading" note={data.baseVersion === 0 ? 'nothing recorded yet' : `version ${data.baseVersion}, bearings from true north`}>Measured scene</SectionHeading>
            <FactList facts={data.facts.map(({ note, ...fact }) => (note ? { ...fact, note } : fact))} />
            <p className="pt-3 text-small text-second">Changing it now: {data.whoEdits}</p>
          </section>
        )}
      </Columns>
    </>
  );
}

interface VersionLine {
  readonly number: number;
  readonly meta: string;
  readonly note: string;
}

function Versions({ versions }: { readonly versions: readonly VersionLine[] }) {
  return (
    <section aria-labelledby="versions-heading">
      <h2 id="versions-heading" className="text-group font-semibold">Versions</h2>
      <p className="text-small text-second">Each one stays, so that a reconstruction can name the one it used.</p>
      {versions.length === 0 ? <p className="pt-2 text-second">None yet.</p> : null}
      <ol>
        {versions.map((version) => (
          <li key={version.number} className="border-b border-hair py-1.5 text-small">
            <span className="font-semibold">Version {version.number}</span>
            <span className="block text-axis text-second">{version.meta}</span>
            {version.note ? <span className="block">{version.note}</span> : null}
          </li>
        ))}
      </ol>
    </section>
  );
}
