import { href, redirect } from 'react-router';
import type { Route } from './+types/measurements';
import { db } from '#db/client.server.ts';
import { casePlace } from '#db/queries/case-place.server.ts';
import { findCase } from '#db/queries/case-subject.server.ts';
import { latestScene, listSceneVersions } from '#db/queries/scenes.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { SceneForm } from '#app/components/cases/scene-form.tsx';
import { Columns } from '#app/components/layout/page.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { DomainError, notFound } from '#app/domain/errors.ts';
import { formatDayClock, localDay } from '#app/domain/local-time.ts';
import { canOnCase, whoCan } from '#app/domain/permissions.ts';
import { sceneSchema } from '#app/domain/scene.ts';
import { sceneToFields } from '#app/domain/scene-form.ts';
import { sceneFacts } from '#app/domain/scene-words.ts';
import { problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { declinationAt } from '#app/services/scenes/declination.server.ts';
import { saveScene } from '#app/services/scenes/save-scene.server.ts';

export async function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const found = await findCase(db, actor, caseNumber);
    if (!found) throw notFound(`Case ${params.caseNumber}`);
    if (!canOnCase(actor, 'reconstruction:read', found.subject)) throw new DomainError('forbidden', `The measurements are not open to you. ${whoCan('reconstruction:read')}`);
    const { zone } = found.row;
    const now = new Date();
    const latest = await latestScene(db, found.row.id);
    const scene = latest?.scene ?? sceneSchema.parse({});
    const versions = await listSceneVersions(db, { actor, caseNumber });
    const { declinationDeg, declinationSource } = declinationAt(await casePlace(db, found.row), now);
    return {
      mayEdit: canOnCase(actor, 'case:edit-facts', found.subject),
      whoEdits: whoCan('case:edit-facts'),
      kind: scene.optic.kind,
      stored: sceneToFields(scene),
      facts: sceneFacts(scene),
      baseVersion: latest?.version ?? 0,
      today: localDay(now, zone),
      declinationWords: declinationDeg === null ? `No magnetic model covers ${declinationSource}.` : `Magnetic declination here today: ${declinationDeg >= 0 ? '+' : ''}${declinationDeg.toFixed(1)}° (${declinationSource}); east is added.`,
      versions: versions.map((version) => ({ number: version.version, meta: `${formatDayClock(version.createdAt, zone)}, ${version.authorName ?? 'with the report'}`, note: version.note })),
    };
  });
}

export async function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    const form = await request.formData();
    const typed = typedValues(form);
    try {
      await saveScene({ actor, caseNumber, baseVersion: Number(typed['baseVersion']), note: typed['note'] ?? '', typed, now: new Date() });
    } catch (error) {
      return problemFromError('save-scene', form, error);
    }
    return redirect(`${href('/cases/:caseNumber', { caseNumber: String(caseNumber) })}/measurements`, 303);
  });
}

export default function Measurements({ loaderData: data, actionData: problem }: Route.ComponentProps) {
  return (
    <Columns sideLabel="Versions" side={<Versions versions={data.versions} />}>
      {data.mayEdit ? (
        <SceneForm key={data.baseVersion} kind={data.kind} stored={data.stored} baseVersion={data.baseVersion} today={data.today} declinationWords={data.declinationWords} problem={problem} />
      ) : (
        <section aria-labelledby="measured-heading" className="max-w-[48rem]">
          <SectionHeading id="measured-heading" note={data.baseVersion === 0 ? 'nothing recorded yet' : `version ${data.baseVersion}, bearings from true north`}>Measured scene</SectionHeading>
          <FactList facts={data.facts.map(({ note, ...fact }) => (note ? { ...fact, note } : fact))} />
          <p className="pt-3 text-small text-second">Changing it now: {data.whoEdits}</p>
        </section>
      )}
    </Columns>
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
