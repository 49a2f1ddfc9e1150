import { useEffect, useState } from 'react';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { listTaken } from './taken-pages.ts';

/** The way to pages of cases that were taken along: without a signal this page is the one that opens by itself. */
export function TakenList() {
  const [paths, setPaths] = useState<readonly string[]>([]);
  useEffect(() => {
    listTaken().then(setPaths, () => undefined); // Storage is switched off: there are none.
  }, []);
  if (paths.length === 0) return null;
  return (
    <section aria-labelledby="taken-heading" className="py-4">
      <h2 id="taken-heading" className="border-b-[1.5px] border-ink pb-1 font-serif text-account">Taken along on this device</h2>
      <ul>
        {paths.map((path) => (
          <li key={path} className="border-b border-hair py-1">
            <AppLink href={path} reload className="inline-flex min-h-11 items-center">Measurements of case {path.split('/')[2]}</AppLink>
          </li>
        ))}
      </ul>
    </section>
  );
}
