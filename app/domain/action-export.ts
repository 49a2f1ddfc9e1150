import type { ActionLine } from './action-view.ts';
import { csvText } from './csv.ts';
import { riskLabels } from './incident.ts';

const head = ['Case', 'Action', 'Title', 'Site', 'Control', 'Interim', 'Owner', 'Verifier', 'Due', 'Risk', 'State', 'Next return of the sun', 'Effect to be checked on'] as const;

/** The list as CSV: days as ISO dates, words as on the screen, every cell harmless to a spreadsheet. */
export function actionsCsv(lines: readonly ActionLine[]): string {
  return csvText(
    head,
    lines.map((line) => [
      line.caseNumber,
      line.number,
      line.title,
      line.siteName,
      line.level,
      line.interim ? 'yes' : 'no',
      line.owner,
      line.verifier,
      line.dueOn,
      riskLabels[line.risk],
      line.stateWords,
      line.nextReturnOn,
      line.effectCheckOn,
    ]),
  );
}
