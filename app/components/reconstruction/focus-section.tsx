import { FluxDiscsFigure } from '#app/components/charts/flux-discs.tsx';
import { SpotDistanceFigure } from '#app/components/charts/spot-distance.tsx';
import { Cell, DataTable, HeadCell, Row, TableHead } from '#app/components/ui/data-table.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import type { Fact } from '#app/components/ui/fact-list.tsx';
import { trackOver } from '#app/domain/flux-discs.ts';
import { plainNumber } from '#app/domain/plain-number.ts';
import type { BeamView } from '#app/domain/run-beam.ts';
import type { RunView } from '#app/domain/run-view.ts';
import type { Band } from '#app/physics/model/stated.ts';

type Focus = NonNullable<RunView['result']['focus']>;

export interface FocusSectionProps {
  readonly focus: Focus;
  readonly rings: RunView['rings'];
  readonly clock: string;
  readonly beam: BeamView | null;
  readonly bestUtc: string | null;
}

const bandWords = (band: Band): string => `${plainNumber(band.low)} to ${plainNumber(band.high)}`;
const lengthWords = (metres: number): string => (metres < 2 ? `${plainNumber(metres * 1000)} mm` : `${plainNumber(metres)} m`);

/** The beam along its way: width of spot or line, where it is strong, and where the mark lies. */
export function BeamFigure({ focus, markDistanceM }: Pick<FocusSectionProps, 'focus'> & { readonly markDistanceM: number | null }) {
  return (
    <SpotDistanceFigure
      figure="Fig. 6"
      title={focus.focusKind === 'line' ? 'Line width against distance, mm' : 'Spot size against distance, mm'}
      points={focus.spotAtDistance}
      dangerZone={focus.dangerZone}
      markDistanceM={markDistanceM}
      focusKind={focus.focusKind}
      note="Flux in the table: mean over a 5 mm disc on the hot spot at that distance, across the chief ray, likely sky."
    />
  );
}

/** Flux on named discs in a named plane, and how long it rests on a point. */
export function FocusSection({ focus, rings, clock, beam, bestUtc }: FocusSectionProps) {
  const line = focus.focusKind === 'line';
  const centre = focus.discs.some((disc) => disc.centre === 'mark') ? 'mark' : 'hot spot';
  const method = focus.traced ? `${focus.traced.rays.toLocaleString('en-GB')} rays traced` : 'Closed form, no rays traced';
  return (
    <div className="grid gap-x-8 gap-y-6 [&>*]:min-w-0 tablet:grid-cols-2 print:grid-cols-1">
      <div className="space-y-6">
        <FluxDiscsFigure
          figure="Fig. 5"
          {...trackOver(beam, bestUtc)}
          title={`Flux at ${clock}, kW/m²`}
          discs={focus.discs.filter((disc) => disc.centre === 'hot spot')}
          rings={rings}
          focusKind={focus.focusKind}
          note={`Plane: ${focus.plane}. Picture centred on the hot spot. ${method}. ${rings.length > 0 ? `${line ? 'Bands: as wide as the mean' : 'Rings: circles as large as the area'} over 1, 3, 10, 30, 100 and 300 kW/m², as far as the map holds them.` : ''}${beam?.facing ? ' Dashes: way of the spot over the target, as one faces it.' : ''}`}
        />
        <section aria-label="Time on one point" className="border-t-[1.5px] border-ink pt-1.5">
          <h3 className="pb-2 text-body font-semibold">Time on one point</h3>
          {focus.dwellS.length > 0 ? <DwellTable focus={focus} /> : <p className="text-second">The motion of the spot over the mark could not be worked out.</p>}
          {line ? <p className="pt-2 font-semibold">A line focus makes a long mark at once: the length of the mark carries no time.</p> : null}
        </section>
      </div>
      <section aria-label="Focus in numbers" className="border-t-[1.5px] border-ink pt-1.5">
        <h3 className="pb-2 text-body font-semibold">Focus in numbers</h3>
        <DiscTable focus={focus} centre={centre} />
        <FactList facts={focusFacts(focus, line)} />
      </section>
    </div>
  );
}

function DiscTable({ focus, centre }: { readonly focus: Focus; readonly centre: 'mark' | 'hot spot' }) {
  return (
    <DataTable caption="Flux by averaging disc and centre, 5 to 95">
      <TableHead>
        <HeadCell>Averaged over</HeadCell>
        <HeadCell>Centred on</HeadCell>
        <HeadCell numeric>Suns</HeadCell>
        <HeadCell numeric>kW/m²</HeadCell>
        <HeadCell numeric>5 to 95</HeadCell>
      </TableHead>
      <tbody>
        {focus.discs.map((disc) => (
          <Row key={`${disc.disc}${disc.centre}`} tight>
            <Cell heading className="!font-normal">{disc.disc === 'sun-image' ? `sun's image, ${plainNumber(disc.diameterMm)} mm` : `${disc.disc} disc`}</Cell>
            <Cell className={disc.centre === centre ? 'font-semibold' : ''}>{disc.centre}</Cell>
            <Cell numeric>{plainNumber(disc.concentration.mid)}</Cell>
            <Cell numeric>{plainNumber(disc.fluxKwm2.mid)}</Cell>
            <Cell numeric>{bandWords(disc.fluxKwm2)}</Cell>
          </Row>
        ))}
      </tbody>
    </DataTable>
  );
}

function focusFacts(focus: Focus, line: boolean): Fact[] {
  const { traced, dangerZone } = focus;
  const facts: Fact[] = [
    { term: line ? 'Line width' : 'Spot', value: `${plainNumber(focus.spotDiameterMm.mid)} mm`, note: bandWords(focus.spotDiameterMm) },
    { term: 'Focal length', value: lengthWords(focus.focalLengthM), note: focus.method === 'ray-trace' ? 'ray trace' : 'closed form' },
  ];
  if (dangerZone) facts.push({ term: `At or above ${plainNumber(dangerZone.thresholdKwm2)} kW/m²`, value: `${lengthWords(dangerZone.nearM)} to ${lengthWords(dangerZone.farM)}`, note: `from the optic, 5 mm disc${dangerZone.widthMm ? `; ${plainNumber(dangerZone.widthMm)} mm wide on the plane of the figures` : ''}` });
  if (focus.trailSpeedMmPerH !== null) facts.push({ term: 'Spot moves', value: `${plainNumber(focus.trailSpeedMmPerH)} mm/h`, note: focus.trailHeadingDeg === null ? '' : `towards ${plainNumber(focus.trailHeadingDeg)}° true` });
  if (focus.trailMinutesAtLeast !== null) facts.push({ term: 'Trail needs at least', value: `${plainNumber(focus.trailMinutesAtLeast)} min of sun` });
  if (traced) {
    if (traced.blockedFraction) facts.push({ term: 'Stopped by frame and bars', value: `${Math.round(traced.blockedFraction * 100)} %`, note: 'of the light towards the optic, ray by ray' });
    facts.push({ term: 'Leaves the optic', value: `${Math.round(traced.transmittedFraction * 100)} %`, note: 'of the light that meets it' });
    facts.push({ term: 'Half, four fifths of the light within', value: `${plainNumber(traced.r50Mm)}, ${plainNumber(traced.r80Mm)} mm`, note: 'radius round the hot spot' });
    if (traced.hotSpotOffsetMm !== null) facts.push({ term: 'Hot spot from the mark', value: `${plainNumber(traced.hotSpotOffsetMm)} mm` });
    facts.push({ term: 'Closed form, same disc', value: `${plainNumber(traced.closedForm)} suns`, note: `trace ±${plainNumber(traced.stdError)}` });
    if (traced.backTraced) facts.push({ term: `Traced back, 5 mm on the ${traced.backTraced.centre}`, value: `${plainNumber(traced.backTraced.concentration)} suns ±${plainNumber(traced.backTraced.stdError)}`, note: traced.backTraced.agrees ? `agrees with ${plainNumber(traced.backTraced.forward)}` : `differs from ${plainNumber(traced.backTraced.forward)} by more than the errors` });
  }
  return facts;
}

function DwellTable({ focus }: { readonly focus: Focus }) {
  return (
    <DataTable caption="Seconds for which one point stays above a flux">
      <TableHead>
        <HeadCell>Above, kW/m²</HeadCell>
        <HeadCell numeric>Seconds</HeadCell>
        <HeadCell numeric>Low to high</HeadCell>
      </TableHead>
      <tbody>
        {focus.dwellS.map((dwell) => (
          <Row key={dwell.thresholdKwm2} tight>
            <Cell heading className="!font-normal">{plainNumber(dwell.thresholdKwm2)}</Cell>
            <Cell numeric>{dwell.seconds.mid > 0 ? plainNumber(dwell.seconds.mid) : 'not reached'}</Cell>
            <Cell numeric>{bandWords(dwell.seconds)}</Cell>
          </Row>
        ))}
      </tbody>
    </DataTable>
  );
}
