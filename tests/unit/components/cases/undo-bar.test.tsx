import { renderToStaticMarkup } from 'react-dom/server';
import { createRoutesStub } from 'react-router';
import { expect, test } from 'vitest';
import { UndoBar } from '#app/components/cases/undo-bar.tsx';

const page = (leftMs: number) => {
  const Stub = createRoutesStub([{ path: '/', Component: () => <UndoBar offer={{ sequence: 41, label: 'Return with one question', leftMs }} casePath="/cases/118" /> }]);
  return renderToStaticMarkup(<Stub />);
};

test('is a form with a button before any script runs, and says how long it holds', () => {
  const html = page(9_400);
  expect(html).toContain('Done: return with one question.');
  expect(html).toMatch(/<form[^>]*action="\/cases\/118\/undo" method="post"/u);
  expect(html).toContain('<input type="hidden" name="sequence" value="41"/>');
  expect(html).toMatch(/within 10 seconds of it.*<button type="submit"[^>]*>Undo<\/button>/u);
  expect(html).not.toContain('role="status"');
});

test('is nothing once the time is over', () => {
  expect(page(0)).not.toContain('Undo');
});
