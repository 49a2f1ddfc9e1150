import { redirect } from 'react-router';
import type { Route } from './+types/home';
import { actorContext } from '#app/auth/actor-context.ts';
import { SignInForm } from '#app/components/auth/sign-in-form.tsx';
import { BurnCard } from '#app/components/burn-card/burn-card.tsx';
import { cautions } from '#app/components/layout/cautions.ts';
import { Page } from '#app/components/layout/page.tsx';
import { ButtonLink } from '#app/components/ui/button.tsx';
import { Caution } from '#app/components/ui/caution.tsx';
import { SectionHeading } from '#app/components/ui/page-title.tsx';
import { homeFor } from '#app/domain/navigation.ts';
import { formatIsoDay } from '#app/domain/local-time.ts';
import { sampleCards } from '#app/services/samples/sample-cards.server.ts';

export async function loader({ context }: Route.LoaderArgs) {
  const actor = context.get(actorContext);
  if (actor) throw redirect(homeFor(actor));
  return { samples: await sampleCards() };
}

export const meta: Route.MetaFunction = () => [
  { title: 'Scorchline: could the sun have done it?' },
  { name: 'description', content: 'A register for burns, melts and near misses from focused sunlight.' },
];

export default function Home({ loaderData }: Route.ComponentProps) {
  const { samples } = loaderData;
  const [first] = samples;
  return (
    <Page>
      <div className="grid gap-x-16 gap-y-8 pt-8 desk:grid-cols-[minmax(0,1fr)_370px] desk:pt-12">
        <div>
          <h1 className="font-serif text-landing">Could the sun have done it?</h1>
          <p className="max-w-[56ch] pt-5 text-account">
            A register for burns, melts and near misses from focused sunlight. Log the mark from a phone. Test the sun, the weather, the energy and the mark apart. See the day it
            will be lit again, and close the case before then.
          </p>
        </div>
        <section aria-labelledby="sign-in-heading" className="border-t-2 border-ink pt-4 max-desk:order-3">
          <h2 id="sign-in-heading" className="pb-3 text-[1.125rem] font-semibold">Sign in</h2>
          <SignInForm next={null} />
        </section>
        <section aria-labelledby="now-heading" className="desk:hidden">
          <MakeSafe headingId="now-heading" />
        </section>
      </div>
      {first ? (
        <figure className="pt-8">
          <BurnCard model={first.large} size="hero" label={`Invented sample: ${first.title}`} />
          <figcaption className="pt-3 text-small text-second">
            Invented sample, computed: {first.title}, {formatIsoDay(first.day)}, {first.large.zone}. Dark: the time examined. Cut through: sunlight on the mark was possible,{' '}
            {first.sunlitMinutes} minutes. Dots: cannot be told.
          </figcaption>
        </figure>
      ) : null}
      <div className="grid gap-x-16 gap-y-8 pt-10 desk:grid-cols-[minmax(0,400px)_minmax(0,1fr)]">
        <section aria-labelledby="now-heading-desk" className="max-desk:hidden">
          <MakeSafe headingId="now-heading-desk" />
        </section>
        <section aria-labelledby="samples-heading">
          <SectionHeading id="samples-heading">Three cases, all invented</SectionHeading>
          <ul>
            {samples.map((sample) => (
              <li key={sample.key} className="grid items-center gap-x-8 gap-y-2 border-b border-hair py-3 tablet:grid-cols-[minmax(0,1fr)_300px]">
                <div>
                  <p className="font-semibold">{sample.title}</p>
                  <p className="text-small text-second">{sample.found}</p>
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

function MakeSafe({ headingId }: { readonly headingId: string }) {
  return (
    <Caution>
      <h2 id={headingId} className="text-[1.125rem] font-semibold">If it is happening now</h2>
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
      <p className="pt-2 text-small text-second">Without an account: use the link or code posted at your site.</p>
    </Caution>
  );
}
