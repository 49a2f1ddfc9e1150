import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { csvCell, csvText } from '#app/domain/csv.ts';

/** A reader after RFC 4180, written apart from the writer. */
function readCsv(text: string): string[][] {
  const rows: string[][] = [];
  let row: string[] = [];
  const pattern = /(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r\n|$)/gy;
  for (let match = pattern.exec(text); match !== null && match[0] !== ''; match = pattern.exec(text)) {
    row.push(match[1] === undefined ? (match[2] ?? '') : match[1].replaceAll('""', '"'));
    if (match[3] !== ',') {
      rows.push(row);
      row = [];
    }
  }
  return rows;
}

describe('cells that a spreadsheet would run (OWASP, CSV Injection)', () => {
  test.each(['=1+1', '+1', '-1+2', '@SUM(A1)', '\t=1', '\r=1', ' =1', '＝1'])('%j is made text', (text) => {
    expect(csvCell(text).replace(/^"/u, '').startsWith("'")).toBe(true);
  });

  test('a number stays a number, negative ones too', () => {
    expect(csvCell(-12.5)).toBe('-12.5');
    expect(csvCell(Number.NaN)).toBe('');
    expect(csvCell(null)).toBe('');
  });

  test('words with a sign inside are left alone', () => {
    expect(csvCell('2026-08-03')).toBe('2026-08-03');
    expect(csvCell('bays 4+5')).toBe('bays 4+5');
  });
});

test('what is written can be read back, quotes, commas and line breaks included', () => {
  const cell = fc.string({ unit: 'grapheme' }).filter((text) => !/^[\s\uFEFF]*[=+\-@\t\r＝＋－＠]/u.test(text));
  fc.assert(
    fc.property(fc.array(fc.array(cell, { minLength: 2, maxLength: 4 }), { minLength: 1, maxLength: 5 }), (rows) => {
      const [head = [], ...rest] = rows;
      expect(readCsv(csvText(head, rest).slice(1))).toEqual(rows);
    }),
  );
});
