import type { CsvValue } from './csv.ts';
import { csvText } from './csv.ts';
import { formatDayClock, formatOffset } from './local-time.ts';
import { minuteReasonWords, minuteVerdictWords } from './run-words.ts';
import type { ReleasedCase } from './released-case.ts';

/** Tables of a release, as files for a spreadsheet. They are made from the released case and from nothing else. */

/** Every stretch of the window with its result, or null where the release holds no reconstruction. */
export function runsCsv(released: ReleasedCase): string | null {
  const run = released.reconstruction;
  if (!run) return null;
  const head = ['from (UTC)', 'to (UTC)', `from (${released.zone})`, `to (${released.zone})`, 'offset', 'minutes', 'result', 'reason'];
  const local = (utc: string) => formatDayClock(new Date(utc), released.zone);
  const rows = run.result.runs.map((stretch): CsvValue[] => [
    stretch.fromUtc,
    stretch.toUtc,
    local(stretch.fromUtc),
    local(stretch.toUtc),
    formatOffset(new Date(stretch.fromUtc), released.zone),
    stretch.minutes,
    minuteVerdictWords[stretch.verdict],
    minuteReasonWords[stretch.reason],
  ]);
  return csvText(head, rows);
}

/** Measurements with unit, ± and method, or null where there are none. */
export function measurementsCsv(released: ReleasedCase): string | null {
  if (released.measurements.length === 0) return null;
  const figure = (text: string): CsvValue => (text !== '' && Number.isFinite(Number(text)) ? Number(text) : text);
  return csvText(
    ['part', 'what', 'value', 'plus or minus', 'unit', 'method'],
    released.measurements.map((row) => [row.group, row.label, figure(row.value), figure(row.plusMinus), row.unit, row.method]),
  );
}
