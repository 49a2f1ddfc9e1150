import { cpus } from 'node:os';
import { exampleInput } from '#app/cli/example-input.ts';
import { traceBundle } from '#app/physics/optics/trace/trace-bundle.ts';
import { reconstruct } from '#app/physics/reconstruct.ts';
import { scanSun } from '#app/physics/sun/sun-scan.ts';

/** Prints figures and asserts nothing: medians of nine runs on one thread, after one to warm up. */

const runs = 9;
const place = { latitudeDeg: 51.5, longitudeDeg: -0.1, elevationM: 20, pressureHpa: 1013.25, temperatureC: 12 };

interface Figure {
  readonly medianMs: number;
  /** Processor time, collector threads included: what stays comparable on a machine that is busy with other work. */
  readonly cpuMs: number;
  readonly memoryMb: number;
}

function median(values: readonly number[]): number {
  return [...values].sort((a, b) => a - b)[values.length >> 1] ?? 0;
}

function measure(work: () => void): Figure {
  work();
  const times: number[] = [];
  const cpuTimes: number[] = [];
  const before = process.memoryUsage();
  let peak = before.heapUsed + before.arrayBuffers;
  for (let run = 0; run < runs; run++) {
    const cpu = process.cpuUsage();
    const start = performance.now();
    work();
    times.push(performance.now() - start);
    const used = process.cpuUsage(cpu);
    cpuTimes.push((used.user + used.system) / 1000);
    const now = process.memoryUsage();
    peak = Math.max(peak, now.heapUsed + now.arrayBuffers);
  }
  return { medianMs: median(times), cpuMs: median(cpuTimes), memoryMb: (peak - before.heapUsed - before.arrayBuffers) / 1e6 };
}

function line(name: string, figure: Figure, note: string): void {
  process.stdout.write(`${name.padEnd(46)} ${figure.medianMs.toFixed(1).padStart(9)} ms ${figure.cpuMs.toFixed(1).padStart(9)} ms CPU  ${figure.memoryMb.toFixed(0).padStart(5)} MB  ${note}\n`);
}

const processor = cpus()[0]?.model ?? 'unknown processor';
process.stdout.write(`${processor}, ${cpus().length} threads, Node ${process.versions.node}; medians of ${runs} runs on one thread\n`);

const minutes = 525_600;
const year = measure(() => scanSun(place, Date.UTC(2026, 0, 1), 60_000, minutes));
line('sun, every minute of a year', year, `${(minutes / year.medianMs / 1000).toFixed(1)} million positions/s`);

const rays = 1_000_000;
const sphere = measure(() => {
  traceBundle({
    optic: { kind: 'sphere', diameterM: 0.1, slopeErrorMrad: 0, material: { name: 'explicit', refractiveIndex: 1.5168, absorptionPerM: 2 } },
    sunDirection: [0, 0, 1], sunHalfAngleRad: 0.00465, receiver: { kind: 'best plane' }, rays, seed: 1,
  });
});
line('sphere trace, one million rays', sphere, `${(rays / sphere.medianMs / 1000).toFixed(1)} million rays/s`);

const { occluders: _occluders, occluderSigmaM: _sigma, ...open } = exampleInput;
const whole = measure(() => reconstruct(open));
line('reconstruction, 100,000 rays, 4,096 samples', whole, 'with a year of recurrence');

const masked = measure(() => reconstruct(exampleInput));
line('the same behind a window with reveal and bar', masked, 'every minute masked ray by ray');

const { mark: _mark, optic: _optic, target: _target, ...sunOnly } = open;
const sky = measure(() => reconstruct({ ...sunOnly, window: { startUtc: '2025-03-01T00:00:00Z', endUtc: '2025-03-15T00:00:00Z', clockSigmaS: 60 } }));
line('sun and sky alone, fourteen days', sky, `${(20_160 / sky.medianMs).toFixed(0)} thousand minutes/s`);
