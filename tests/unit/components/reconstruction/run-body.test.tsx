import { renderToStaticMarkup } from 'react-dom/server';
import { describe, expect, test } from 'vitest';
import { RunBody } from '#app/components/reconstruction/run-body.tsx';
import type { RunPageView } from '#app/domain/run-page.ts';
import { runView } from '#app/domain/run-view.ts';
import type { ReconstructionInput } from '#app/physics/model/input.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';

const now = new Date('2026-06-01T08:00:00Z');
const plain: ReconstructionInput = {
  place: { latitudeDeg: 53.5, longitudeDeg: -1.6, elevationM: 60, heightAboveGroundM: 0, zone: 'Europe/London' },
  window: { startUtc: '2026-05-09T10:00:00.000Z', endUtc: '2026-05-09T10:40:00.000Z', clockSigmaS: 60 },
  sky: { climateClass: 'temperate-rural' },
  recurrenceToUtc: '2026-12-01T00:00:00.000Z',
  rays: 2000,
  samples: 64,
  seed: 7,
};
const mark = { bearingDeg: 330, bearingSigmaDeg: 3, elevationDeg: -45, elevationSigmaDeg: 3, distanceM: 0.091, distanceSigmaM: 0.002, lengthMm: 12, widthMm: 4 };
const ball: ReconstructionInput = { ...plain, optic: { kind: 'sphere', diameterM: 0.12, material: { name: 'acrylic' } }, mark, target: { materialId: 'wool-felt' } };

function page(input: ReconstructionInput): string {
  const view = runView(input, reconstruct(input), { foundAt: null, now });
  const line: RunPageView['line'] = {
    number: 1, state: 'done', askedWords: '', askedBy: '', engineVersion: '', inputHash: '', sceneVersion: 1, note: '', windowWords: '', totals: view.result.totals,
    grade: view.result.grade, standing: 'not attached', progress: { done: 1, total: 1 }, failure: null,
  };
  return renderToStaticMarkup(<RunBody page={{ line, zone: input.place.zone, zoneRules: '', resultHash: null, finishedWords: null, runCount: 1, changes: null, refusal: null, attachRefusal: null, photo: null, view }} view={view} href="/cases/1/reconstructions/1" label="Case 1, run 1" words={null} />);
}

describe('the page of a run', () => {
  test('without an optic shows sun, tests and checks, and no flux', () => {
    const html = page(plain);
    expect(html).toContain('Sun path and skyline');
    expect(html).toContain('What would rule this out?');
    expect(html).not.toContain('Flux at');
  });

  test('with an optic names disc, centre and plane of every flux', () => {
    const html = page(ball);
    expect(html).toContain('Flux at');
    expect(html).toContain('Plane: ');
    expect(html).toContain('Centred on');
    expect(html).toContain('2,000 rays traced');
  });

  test('says "unverified" beside values from memory, and shows the cautions on estimates and on local law', () => {
    const html = page(ball);
    expect(html).toContain('; unverified');
    expect(html).toContain('Not a certificate, design approval, legal cause');
    expect(html).toContain('Follow your local law');
  });

  test('counts samples and never gives a likelihood in percent', () => {
    const html = page(ball);
    expect(html).toMatch(/\d+ of 64/u);
    expect(html).not.toMatch(/likelihood of (?:the )?(?:sun|cause)[^<]*%|sun likelihood/iu);
  });

  test('of a line focus says that the length of the mark carries no time', () => {
    const html = page({ ...ball, optic: { kind: 'cylinder', diameterM: 0.065, lengthM: 0.2, axisAzimuthDeg: 0, axisElevationDeg: 90, material: { name: 'water' } }, mark: { ...mark, distanceM: 0.06 } });
    expect(html).toContain('the length of the mark carries no time');
  });

  test('of a window at night says that the sun does not stand in it', () => {
    const html = page({ ...plain, window: { ...plain.window, startUtc: '2026-05-09T00:00:00.000Z', endUtc: '2026-05-09T01:00:00.000Z' } });
    expect(html).toContain('Read this first');
    expect(html).toContain('No minute sunlit');
  });

  test('of a fortnight is drawn a day at a time', () => {
    const html = page({ ...plain, window: { ...plain.window, startUtc: '2026-04-26T00:00:00.000Z' } });
    expect(html).toContain('alike');
    expect(html).toContain('The window has several days');
  });

  test('offers every figure as numbers and as a file under the address of the run', () => {
    const html = page(ball);
    for (const id of ['sun-path', 'beam', 'flux-discs', 'spot-distance', 'irradiance', 'temperature', 'returns']) expect(html).toContain(`href="/cases/1/reconstructions/1/figures/${id}.csv"`);
    expect(html).toContain('Section along 330.0°');
    expect(html).toContain('Plan at');
    expect(html).toContain('Way of the spot over the target, as one faces it');
    expect(html).toContain('its direction was not recorded and is taken square to the line from the optic');
  });

  test('says what is missing where no photo has a scale', () => {
    expect(page(ball)).toContain('measure the mark on a square-on photo');
  });

  test('tells of each minute why it is not sunlit', () => {
    expect(page(ball)).toMatch(/aria-valuetext="11:\d\d, (?:not sunlit|can&#x27;t tell), [^"]+; sun \d/u);
  });
});
