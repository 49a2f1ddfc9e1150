import { redirect } from 'react-router';
import type { Route } from './+types/home';
import { actorContext } from '#app/auth/actor-context.ts';
import { SignInForm } from '#app/components/auth/sign-in-form.tsx';
import { BurnCard } from '#app/components/burn-card/burn-card.tsx';
import { cautions } from '#app/components/layout/cautions.ts';
import { Page } from '#app/components/layout/page.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { Button, ButtonLink } from '#app/components/ui/button.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { homeFor } from '#app/domain/navigation.ts';
import { formatIsoDay } from '#app/domain/local-time.ts';
import { sampleCards } from '#app/services/samples/sample-cards.server.ts';

export async function loader({ context }: Route.LoaderArgs) {
  const actor = context.get(actorContext);
  if (actor) throw redirect(homeFor(actor));
  return { samples: await sampleCards() };
}

type Sample = Route.ComponentProps['loaderData']['samples'][number];

export const meta: Route.MetaFunction = () => [
  { title: 'Scorchline: could the sun have done it?' },
  { name: 'description', content: 'A register for burns, melts and near misses from focused sunlight.' },
];

/**
 * On a phone the order is: question, card, make safe, sign in, samples. At the desk sign-in stands beside the question;
 * the order of reading stays that of the phone, so that making safe is always met first.
 */
export default function Home({ loaderData }: Route.ComponentProps) {
  const { samples } = loaderData;
  return (
    <Page>
      <div className="grid gap-x-14 gap-y-8 pt-7 desk:grid-cols-[400px_minmax(0,1fr)_370px] desk:gap-y-10 desk:pt-12">
        <div className="desk:col-span-2 desk:row-start-1">
          <h1 className="font-serif text-landing">Could the sun have done it?</h1>
          <p className="max-w-[56ch] pt-4 text-account desk:pt-5">
            A register for burns, melts and near misses from focused sunlight. Log the mark from a phone. Test the sun, the weather, the energy and the mark apart. See the day it
            will be lit again, and close the case before then.
          </p>
        </div>
        {samples[0] ? <LargeSample sample={samples[0]} /> : null}
        <section aria-labelledby="now-heading" className="desk:col-start-1 desk:row-start-3">
          <MakeSafe headingId="now-heading" />
        </section>
        <section aria-labelledby="sign-in-heading" className="border-t-2 border-ink pt-3 desk:col-start-3 desk:row-start-1">
          <h2 id="sign-in-heading" className="pb-2 text-[1.125rem]/6 font-semibold">Sign in</h2>
          <SignInForm next={null} />
        </section>
        <section aria-labelledby="samples-heading" className="desk:col-span-2 desk:col-start-2 desk:row-start-3">
          <h2 id="samples-heading" className="pb-2 text-[1.125rem]/6 font-semibold">Three cases, all invented</h2>
          <ul className="border-t border-hair">
            {samples.map((sample) => (
              <li key={sample.key} className="grid items-center gap-x-8 gap-y-2 border-b border-hair py-3 tablet:grid-cols-[minmax(0,1fr)_300px]">
                <div>
                  <p className="font-semibold">{sample.title}</p>
                  <p className="text-small text-second">{sample.found}; {minutesInWords(sample.small.runs)}</p>
                </div>
                <BurnCard model={sample.small} size="S" label={sample.title} />
              </li>
            ))}
          </ul>
          <p className="pt-3 text-small text-second">{cautions.estimates}</p>
        </section>
      </div>
    </Page>
  );
}

const afterMs = 8_400_000;

/** The window from its first minute, and daylight after it that nobody examined. */
function withTimeAfter(card: Sample['large']): Sample['large'] {
  return { ...card, toUtc: new Date(Date.parse(card.toUtc) + afterMs).toISOString() };
}

/** What the engine found for the minutes examined. */
function minutesInWords(runs: Sample['small']['runs']): string {
  const minutes = (verdict: Sample['small']['runs'][number]['verdict']) =>
    Math.round(runs.filter((run) => run.verdict === verdict).reduce((sum, run) => sum + Date.parse(run.toUtc) - Date.parse(run.fromUtc), 0) / 60_000);
  const [sunlit, open] = [minutes('sunlit'), minutes('cannot-tell')];
  const total = sunlit + open + minutes('not-sunlit');
  if (sunlit > 0) return `${sunlit} of ${total} minutes sunlit`;
  return open > 0 ? `${open} of ${total} minutes cannot be told` : `none of ${total} minutes sunlit`;
}

/** The first sample, edge to edge; its facts are computed, its place is invented. */
function LargeSample({ sample }: { readonly sample: Sample }) {
  return (
    <figure className="desk:col-span-3 desk:row-start-2">
      <div className="mx-[calc(-1*var(--page-margin))]">
        <BurnCard model={withTimeAfter(sample.large)} size="hero" label={`Invented sample: ${sample.title}`} />
      </div>
      <figcaption className="pt-3 text-small text-second">
        Invented place, computed sun: {sample.title}, {formatIsoDay(sample.day)}, {sample.large.zone}. Dark: the time examined. Cut through: sunlight on the mark was possible,{' '}
        {sample.sunlitMinutes} minutes. Dots: cannot be told.
      </figcaption>
    </figure>
  );
}

function MakeSafe({ headingId }: { readonly headingId: string }) {
  return (
    <Caution>
      <h2 id={headingId} className="text-[1.125rem]/6 font-semibold">If it is happening now</h2>
      <p className="pt-2">
        <b className="font-semibold">Smoking or burning:</b> raise the alarm, get out, call the emergency number. Report after.
      </p>
      <p className="pt-2">
        <b className="font-semibold">A bright patch:</b> come from the shaded side, cover or shade the glass or metal, keep others out. Do not look at the sun, its reflection, or along
        the beam, even with sunglasses. Do not try it again to see.
      </p>
      <p className="pt-4">
        <ButtonLink href="/report">Report a mark</ButtonLink>
      </p>
      <form method="get" action="/report" className="flex flex-wrap items-end gap-x-3 gap-y-2 pt-4">
        <div className="min-w-0 flex-1 basis-44">
          <TextInput field={{ name: 'at', id: `${headingId}-code`, required: true }} label="No account? Site code" autoComplete="off" autoCapitalize="none" spellCheck={false} />
        </div>
        <Button look="outlined">Report with the code</Button>
      </form>
    </Caution>
  );
}
