import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { markText, nothingHeld, redactedWords, redactSentences, redactText, searcherFor } from '#app/domain/redact-text.ts';
import type { HeldWords } from '#app/domain/redact-text.ts';
import { namesLikeWords } from '#app/domain/held-names.ts';
import { sentencesOf } from '#app/domain/lines-to-decide.ts';

/** The text with a bracketed class where something was taken out. */
function cut(text: string, held: Partial<HeldWords> = {}): string {
  return redactText(text, searcherFor({ ...nothingHeld, ...held }))
    .map((piece) => ('text' in piece ? piece.text : `[${piece.withheld}]`))
    .join('');
}
const named = (text: string, ...names: string[]) => cut(text, { names });

describe('names that the case holds', () => {
  it.each([
    ['as held', 'Hollis Branwen let us in.', '[personal] let us in.'],
    ['in any case', 'HOLLIS saw branwen and Hollis', '[personal] saw [personal] and [personal]'],
    ['turned round', 'Branwen, Hollis: in', '[personal]: in'],
    ['with a possessive', 'Branwen’s key and Hollis\'s door', '[personal] key and [personal] door'],
    ['as a family', 'the Branwens were away', 'the [personal] were away'],
    ['with initials', 'H. Branwen and H.B. said so', '[personal] and [personal] said so'],
    ['inside a file name', 'see hollis_branwen_kitchen.jpg', 'see [personal]_kitchen.jpg'],
    ['run together', 'folder HollisBranwen2', 'folder [personal]2'],
    ['across a line break', 'Hollis\nBranwen', '[personal]'],
    ['with invisible characters inside', 'Bran\u200Bwen and Hol\u00ADlis', '[personal] and [personal]'],
  ])('go %s', (_how, text, expected) => {
    expect(named(text, 'Hollis Branwen')).toBe(expected);
  });

  it('go with and without accents, and as they are written out', () => {
    const text = 'Søren, Soren, Soeren, Kjær, Kjaer, Müller, MUELLER, Muller and Mu\u0308ller';
    expect(named(text, 'Søren Kjær-Müller')).not.toMatch(/s[øo]e?ren|kj[æa]e?r|m[uü]e?ller/iu);
    expect(named('Müller, Muller', 'Anna Mueller')).toBe('[personal], [personal]');
  });

  it('go with hyphens and apostrophes of any kind, and without them', () => {
    expect(named('Anne-Marie, Anne‑Marie, Annemarie, Marie', 'Anne-Marie Quist')).toBe('[personal], [personal], [personal], [personal]');
    expect(named("O'Dannell, O’Dannell, ODannell", "Aoife O'Dannell")).toBe('[personal], [personal], [personal]');
  });

  it('go in scripts without spaces between words', () => {
    expect(named('我和王小明说', '王小明')).toBe('我和[personal]说');
  });

  it('that are also words go where they begin with a capital, and the preparer is told', () => {
    expect(named('The mark is long. Mark found it.', 'Mark Ostrevan')).toBe('The mark is long. [personal] found it.');
    expect(namesLikeWords(['Mark Ostrevan', 'Hollis Branwen'])).toEqual(['Mark']);
  });

  it('leave longer words alone', () => {
    expect(named('Brandenburg, Annexe, hollister', 'Ann Brand', 'Hollis Quist')).toBe('Brandenburg, Annexe, hollister');
  });

  it('do not count the words of a name as several blocks', () => {
    expect(redactText('Hollis van der Branwen came', searcherFor({ ...nothingHeld, names: ['Hollis van der Branwen'] })).filter((piece) => 'withheld' in piece)).toHaveLength(1);
  });
});

describe('contacts', () => {
  const held = { phones: ['+44 7700 900412'], emails: ['o.marsh@flats.example'] };
  it.each(['07700 900412', '07700900412', '+44 (0)7700-900.412', '0044 7700 900 412', '7700 900412'])('a held number goes however it is written: %s', (number) => {
    expect(cut(`Ring ${number} please`, held)).toBe('Ring [personal] please');
  });

  it.each(['716 555 0142', '(716) 555-0142', '555-0142', '+41 44 668 18 00', '020 7946 0018'])('a number that nobody holds goes by its form: %s', (number) => {
    expect(cut(`call ${number}.`)).toBe('call [personal].');
  });

  it.each(['2025-12-14 12:31', '14/12/2025', '14.12.2025', '1200-1400 mm', '41 mm by 8 mm', '136 kW/m²', '0.35 0.85 0.12', '2024-2026', '101,325 Pa', '1 013.25 hPa'])('dates, ranges and measured values stay: %s', (text) => {
    expect(cut(`Seen ${text} there`)).toBe(`Seen ${text} there`);
  });

  it.each(['a.b@flats.example', 'O.MARSH@Flats.example', 'a.b (at) flats (dot) example', 'https://flats.example/u/77', 'www.flats.example/77'])('addresses and links go: %s', (text) => {
    expect(cut(`write to ${text} now`)).toBe('write to [personal] now');
  });

  it('number plates in capitals go, lower-case words do not', () => {
    expect(cut('the van KL40 TQX stood, at pm10 the')).toBe('the van [personal] stood, at pm10 the');
  });
});

describe('places', () => {
  const held = { coordinates: [{ latitudeDeg: 51.40213, longitudeDeg: -2.90417 }], addresses: ['12 Tarrow Quay, BS1 4DJ'] };
  it.each([
    '51.40213, -2.90417', '51.402, 2.904 W', '51.40 N 2.90 W', 'N 51.40 W 2.90', '51.4, -2.9', '51°24′07″N 2°54′15″W', '51° 24.13\' N', 'lat 51.40', 'longitude: -2.9',
    '9C3V2X2X+4M', '///table.lamp.chair', 'BS1 4DJ', 'bs1 4dj', 'NY 14221-0042', '12 Tarrow Quay', 'Tarrow Quay 12',
  ])('%s goes', (text) => {
    expect(cut(`it is at ${text} there`, held)).toMatch(/^it is at (?:\[exact-place\][\s,;]*)+ there$/u);
  });

  it.each(['bearing 182° 30\'', 'window faces 182°', '51.4 mm and 2.9 mm thick', 'M8 5mm bolt', 'Tarrow Quay House', 'sun 15.4° high at 181°', 'plot 41'])('%s stays', (text) => {
    expect(cut(`it is ${text} there`, held)).toBe(`it is ${text} there`);
  });

  it('the name of the site goes where the reader may not know it, with the words that only it has', () => {
    const places = ['Tarrow Quay House', 'TARROW', 'Pellerin Housing'];
    expect(cut('At Tarrow Quay House, the Tarrow flats of Pellerin', { places })).toBe('At [exact-place], the [exact-place] flats of [exact-place]');
    expect(cut('the house on the quay', { places })).toBe('the house on the quay');
  });
});

describe('health, children and legal matters', () => {
  it.each(['burned her right hand', 'his left eye', 'hand was burned', 'went to hospital', 'second-degree', 'blistered'])('%s goes as health', (text) => {
    expect(cut(`Somebody ${text} then`)).toContain('[health]');
  });
  it.each(['burnt cloth', 'left hand side', 'the face of the mirror', 'the seat burned', 'the back of the panel'])('%s stays', (text) => {
    expect(cut(`It was ${text} then`)).toBe(`It was ${text} then`);
  });
  it.each(['A boy stood there', 'she is aged 9', 'a 9-year-old', 'under-16'])('%s goes as child', (text) => {
    expect(cut(`${text} then`)).toContain('[child]');
  });
  it('a sentence with legal advice goes whole', () => {
    expect(cut('It was dark. Our solicitor says to keep the old panel. It is in the shed.')).toBe('It was dark. [legal] It is in the shed.');
  });
});

describe('sentences', () => {
  const sentences = (text: string) => sentencesOf(text).map(({ start, end }) => text.slice(start, end).trim());
  it('end at full stops, but not after initials, titles or decimals', () => {
    expect(sentences('Found at 12.31 by H. Branwen. It smoked! Dr. Quist came.\nNext line')).toEqual(['Found at 12.31 by H. Branwen.', 'It smoked!', 'Dr. Quist came.', 'Next line']);
  });
  it('cover the text without gap or overlap', () => {
    fc.assert(
      fc.property(fc.string(), (text) => {
        const parts = sentencesOf(text);
        expect(parts.map(({ start, end }) => text.slice(start, end)).join('')).toBe(text);
      }),
    );
  });
  it('held back in a row are one block, and the others are still searched', () => {
    const text = 'Alder was here. Beech was here. Cedar was here. Hollis was here.';
    const shared = redactSentences(text, searcherFor({ ...nothingHeld, names: ['Hollis Branwen'] }), sentencesOf(text), (sentence) => /Alder|Hollis/u.test(sentence));
    expect(shared).toEqual([{ text: 'Alder was here. ' }, { withheld: 'free-text' }, { text: ' ' }, { withheld: 'personal' }, { text: ' was here.' }]);
  });
});

describe('any text', () => {
  it('is given back whole apart from the blocks: nothing is invented and nothing moves', () => {
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme', maxLength: 200 }), (text) => {
        const marked = markText(text, searcherFor({ ...nothingHeld, names: ['Hollis Branwen', 'Li Wu'] }));
        expect(marked.map((piece) => piece.text).join('')).toBe(text);
      }),
    );
  });

  const nameWord = fc.stringMatching(/^[A-Z][a-z]{4,9}$/u);
  const looks = [(name: string) => name, (name: string) => name.toUpperCase(), (name: string) => name.toLowerCase(), (name: string) => `${name}'s`, (name: string) => `${name}’s`, (name: string) => `(${name})`, (name: string) => `_${name}_`, (name: string) => [...name].join('\u200B')];
  it('with a rare name in it, however dressed, loses the name', () => {
    fc.assert(
      fc.property(nameWord, nameWord, fc.constantFrom(...looks), fc.lorem({ maxCount: 8 }), (first, last, dress, filler) => {
        const names = [`${first}q ${last}x`];
        const out = redactedWords(redactText(`${filler} ${dress(`${first}q`)} ${filler} ${dress(`${last}x`)}, ${filler}`, searcherFor({ ...nothingHeld, names })));
        const plain = out.replaceAll('\u200B', '').toLowerCase();
        expect(plain).not.toContain(`${first}q`.toLowerCase());
        expect(plain).not.toContain(`${last}x`.toLowerCase());
      }),
      { numRuns: 300 },
    );
  });
});
