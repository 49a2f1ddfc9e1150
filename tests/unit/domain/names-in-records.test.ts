import { expect, test } from 'vitest';
import { personNamesIn } from '#app/domain/names-in-records.ts';

test.each([
  ['Edda Rosmer', ['Edda Rosmer']],
  ['Laboratory Halm, Edda Rosmer', ['Edda Rosmer']],
  ['Shop of the museum, Linnea Aust', ['Linnea Aust']],
  ['Dr. Ilse van der Meer and Jo O’Brien-Lunde', ['Dr. Ilse van der Meer', 'Jo O’Brien-Lunde']],
  ['Žofie Dvořáková (night guard)', ['Žofie Dvořáková']],
])('%s names people', (text, names) => {
  expect(personNamesIn(text)).toEqual(names);
});

test.each(['Safe of the museum', 'Store Vestre', 'Night Guard', 'Fire Service, Station 4', 'the investigator', 'Police', '', 'Kestwick Court'])('%j names a part or a place, nobody', (text) => {
  expect(personNamesIn(text)).toEqual([]);
});
