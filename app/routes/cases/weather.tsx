import { data, Form, href, redirect } from 'react-router';
import type { Route } from './+types/weather';
import { db } from '#db/client.server.ts';
import { getWeatherPage } from '#db/queries/weather-page.server.ts';
import { requireActor } from '#app/auth/middleware.server.ts';
import { MeasureNav } from '#app/components/cases/measure-nav.tsx';
import { IrradianceDayFigure } from '#app/components/charts/irradiance-day.tsx';
import { Button } from '#app/components/ui/button.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { WeatherFileForm, WeatherMappingForm } from '#app/components/weather/weather-file-form.tsx';
import { WeatherHandForm } from '#app/components/weather/weather-hand-form.tsx';
import { WeatherRecords } from '#app/components/weather/weather-records.tsx';
import { readCaseNumber } from '#app/domain/case-number.ts';
import { DomainError } from '#app/domain/errors.ts';
import { localDay } from '#app/domain/local-time.ts';
import type { Actor } from '#app/domain/roles.ts';
import { readHandValues, readWeatherSource } from '#app/domain/weather-form.ts';
import { env } from '#app/env.server.ts';
import { problemFromError, typedValues } from '#app/http/form-result.server.ts';
import { readForm } from '#app/http/multipart-form.server.ts';
import { respond } from '#app/http/to-response.server.ts';
import { addWeather, setWeatherAside } from '#app/services/weather/add-weather.server.ts';
import { archiveOffSentence, fetchArchive } from '#app/services/weather/fetch-archive.server.ts';
import { importFile, lookAtFile, tryFile } from '#app/services/weather/import-weather.server.ts';

export function loader({ request, context, params }: Route.LoaderArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const page = await getWeatherPage(db, { actor, caseNumber: readCaseNumber(params.caseNumber) });
    return { ...page, day: localDay(page.trace ? new Date(page.trace.toUtc) : new Date(), page.zone), archive: env.WEATHER_API_URL ? new URL(env.WEATHER_API_URL).host : null, archiveOff: archiveOffSentence, again: new URL(request.url).searchParams.get('again') === 'yes' };
  });
}

export function action({ request, context, params }: Route.ActionArgs) {
  return respond(async () => {
    const actor = requireActor(context, request);
    const caseNumber = readCaseNumber(params.caseNumber);
    let fileText = '';
    const form = request.headers.get('content-type')?.startsWith('multipart/form-data')
      ? await readForm(request, async ({ bytes }) => { fileText = new TextDecoder('utf-8').decode(bytes); return Promise.resolve(); })
      : await request.formData();
    if (fileText) form.set('text', fileText);
    const typed = typedValues(form);
    const intent = typed['intent'] ?? '';
    const page = href('/cases/:caseNumber/weather', { caseNumber: String(caseNumber) });
    try {
      if (intent === 'look-at-file' || intent === 'try-file') return { stage: await stageOf(actor, caseNumber, intent, typed) };
      const added = await perform(intent, actor, caseNumber, typed);
      return redirect(added ? page : `${page}?again=yes`, 303);
    } catch (error) {
      if (intent === 'try-file' || intent === 'import-file') return refusedStage(actor, caseNumber, form, intent, error);
      return problemFromError(intent, form, error);
    }
  });
}

type Typed = Record<string, string>;

async function stageOf(actor: Actor, caseNumber: number, intent: string, typed: Typed) {
  const look = await lookAtFile({ actor, caseNumber, text: typed['text'] ?? '' });
  const dryRun = intent === 'try-file' || look.format !== 'table' ? await tryFile({ actor, caseNumber, typed: { ...look.sourceGuess, ...typed } }) : null;
  return { look, typed: intent === 'try-file' ? typed : { ...look.guess, ...look.sourceGuess, ...typed }, dryRun };
}

/** A refusal in the second step keeps the file and what was said of it on the page. */
async function refusedStage(actor: Actor, caseNumber: number, form: FormData, intent: string, error: unknown) {
  if (!(error instanceof DomainError) || error.code === 'not-found' || error.code === 'forbidden') return problemFromError(intent, form, error);
  const typed = typedValues(form);
  const look = await lookAtFile({ actor, caseNumber, text: typed['text'] ?? '' });
  return data({ stage: { look, typed, dryRun: null }, ...{ intent, formErrors: [error.message, ...error.needs], fieldErrors: error.fieldErrors, typed } }, { status: 400 });
}

/** @returns false when the same values were there already. */
async function perform(intent: string, actor: Actor, caseNumber: number, typed: Typed): Promise<boolean> {
  if (intent === 'import-file') return importFile({ actor, caseNumber, typed });
  if (intent === 'fetch-archive') return fetchArchive({ actor, caseNumber });
  if (intent === 'set-aside') {
    await setWeatherAside({ actor, caseNumber, number: Number(typed['number']), reason: typed['reason'] ?? '' });
    return true;
  }
  if (intent !== 'add-hand') throw new DomainError('invalid-input', 'The form was not understood. Load the page again.');
  const { zone } = await getWeatherPage(db, { actor, caseNumber });
  const [source, hand] = [readWeatherSource(typed), readHandValues(typed, zone)];
  if (!source.ok || !hand.ok) throw new DomainError('invalid-input', 'The values are not kept yet.', { fieldErrors: { ...(source.ok ? {} : source.fieldErrors), ...(hand.ok ? {} : hand.fieldErrors) } });
  return addWeather({ actor, caseNumber, kind: 'hand', source: source.source, values: hand.values, fileSha256: null, mapping: {} });
}

export const meta: Route.MetaFunction = ({ params }) => [{ title: `Case ${params.caseNumber}, weather · Scorchline` }];

/** Two things side by side at the desk. */
const pair = 'space-y-8 desk:grid desk:grid-cols-[minmax(0,3fr)_minmax(0,2fr)] desk:items-start desk:gap-x-12 desk:space-y-0';

export default function WeatherPage({ loaderData: page, actionData }: Route.ComponentProps) {
  const stage = actionData && 'stage' in actionData ? actionData.stage : null;
  const problem = actionData && 'intent' in actionData ? actionData : undefined;
  return (
    <>
      <MeasureNav caseNumber={page.caseNumber} current="weather" />
      <div className="space-y-8">
        {page.again ? <p role="status" className="font-semibold">The same values of the same source are here already; nothing was added.</p> : null}
        <div>
          <h2 className="font-serif text-title">{page.heading}</h2>
          <p className="max-w-[64ch] text-second">{page.choiceWords} {page.choiceCaution}</p>
        </div>
        <div className={pair}>
          {page.trace ? (
            <IrradianceDayFigure title="Direct irradiance through the onset window, W/m²" zone={page.zone} fromUtc={page.trace.fromUtc} toUtc={page.trace.toUtc} bound={page.trace.bound} likely={page.trace.likely} {...(page.trace.measured.length > 0 ? { measured: page.trace.measured, measuredName: page.trace.measuredName } : {})} note="Square to the sun, before any glass. Dashed: what the cleanest air could pass. Thin: likely clear sky of the air class. Steps: the record that a run goes by." />
          ) : null}
          <WeatherRecords records={page.records} mayEdit={page.mayEdit} problem={problem} />
        </div>
        {page.mayEdit ? (
          <>
            <div className={stage ? 'space-y-8' : pair}>
              <section className="min-w-0 space-y-4">
                <SectionHeading note="tried first, kept after">From a file</SectionHeading>
                {stage ? <WeatherMappingForm key={stage.dryRun ? 'tried' : 'new'} stage={stage} problem={problem} /> : <WeatherFileForm problem={problem} />}
              </section>
              <Archive host={page.archive} offWords={page.archiveOff} refused={problem?.intent === 'fetch-archive' ? problem.formErrors : []} />
            </div>
            <section className="space-y-4">
              <SectionHeading note={page.windowWords ? `onset window ${page.windowWords}` : undefined}>By hand</SectionHeading>
              <WeatherHandForm key={page.records.length} day={page.day} zone={page.zone} problem={problem} />
            </section>
          </>
        ) : <p className="text-small text-second">Changing it now: {page.whoEdits}</p>}
      </div>
    </>
  );
}

function Archive({ host, offWords, refused }: { readonly host: string | null; readonly offWords: string; readonly refused: readonly string[] }) {
  return (
    <section className="min-w-0 space-y-3">
      <SectionHeading note={host ?? 'switched off'}>From the archive</SectionHeading>
      {refused.length > 0 ? <p role="alert" className="font-semibold">{refused.join(' ')}</p> : null}
      {host ? (
        <Form method="post">
          <p className="pb-3">Hour means of a model or satellite for the days around the window. The place is sent rounded to 0.01°, nothing else of the case.</p>
          <input type="hidden" name="intent" value="fetch-archive" />
          <Button look="outlined">Fetch the hours around the window</Button>
        </Form>
      ) : <p>{offWords}</p>}
    </section>
  );
}
