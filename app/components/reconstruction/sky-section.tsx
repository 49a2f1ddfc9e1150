import { IrradianceDayFigure } from '#app/components/charts/irradiance-day.tsx';
import { SunPathFigure } from '#app/components/charts/sun-path.tsx';
import { FactList } from '#app/components/ui/fact-list.tsx';
import type { Fact } from '#app/components/ui/fact-list.tsx';
import type { RunView } from '#app/domain/run-view.ts';

export interface SunSectionProps {
  readonly view: RunView;
  readonly zone: string;
  readonly cursorUtc: string | null;
}

/** Where the sun stood, against skyline and opening, and what the mark asks of it. */
export function SunSection({ view, zone, cursorUtc }: SunSectionProps) {
  const several = view.scrubs ? '' : ` The window has several days; drawn is ${view.dayLabel}.`;
  return (
    <SunPathFigure
      figure="Fig. 1"
      title="Sun path and skyline from the optic"
      zone={zone}
      minutes={view.minutes.filter((minute) => minute.apparentElevationDeg > -3)}
      day={view.dayPath}
      dayLabel={view.dayLabel}
      references={view.references}
      skyline={view.skyline}
      required={view.required}
      opening={view.opening}
      cursorUtc={cursorUtc}
      note={`Azimuth from true north, apparent altitude.${several} ${view.skyline.length === 0 ? 'No skyline was measured: nothing is said about what stands in front of the sun.' : ''}${view.opening ? ' Blue wash between dashes: seen through the opening.' : ''}${view.required ? ' Ellipse: where the sun must stand for the focus to fall on the mark, with the ± of the survey.' : ''}`}
    />
  );
}

const wm2 = (value: number | null): string => (value === null ? 'none' : `${Math.round(value)} W/m²`);

/** Direct irradiance through the window, and at the best minute by every model. */
export function IrradianceSection({ view, zone, clock }: { readonly view: RunView; readonly zone: string; readonly clock: string | null }) {
  const { irradiance } = view;
  const dni = view.result.best?.dni;
  const facts: Fact[] = dni
    ? [
        { term: 'Likely, clear sky', value: wm2(dni.likelyWm2), note: dni.measuredWm2 === null ? 'Bird and Hulstrom 1981' : 'measured' },
        { term: 'Second model', value: wm2(dni.secondModelWm2), note: 'Ineichen and Perez 2002' },
        { term: 'Clean-air bound', value: wm2(dni.boundWm2), note: 'the only figure that may refute' },
        { term: 'Measured or archived', value: wm2(dni.measuredWm2) },
        { term: 'At the optic, likely', value: wm2(dni.atOpticLikelyWm2), note: 'after glass in the path' },
        { term: 'At the optic, bound', value: wm2(dni.atOpticBoundWm2), note: 'after glass in the path' },
      ]
    : [];
  return (
    <div className="min-w-0">
      <IrradianceDayFigure
        figure="Fig. 7"
        title="Direct irradiance, W/m²"
        zone={zone}
        fromUtc={irradiance.fromUtc}
        toUtc={irradiance.toUtc}
        bound={irradiance.bound}
        likely={irradiance.likely}
        {...(irradiance.measured.length > 0 && irradiance.measuredName ? { measured: irradiance.measured, measuredName: irradiance.measuredName } : {})}
        sunlit={irradiance.sunlit}
        note={`Square to the sun, before any glass. Dashed: clean-air bound. Thin: likely clear sky of the air class, going over from 10° down to the lower of two models at 6°; none below 3°. ${irradiance.measured.length === 0 ? 'No measured series was entered for this time.' : ''}`}
      />
      {dni && clock ? (
        <div className="pt-2">
          <h3 className="text-small font-semibold">At {clock}, the best minute</h3>
          <FactList facts={facts} />
          <p className="pt-1 text-axis text-second">Basis: {dni.basis}.</p>
        </div>
      ) : null}
    </div>
  );
}
