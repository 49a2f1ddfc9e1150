import type { WithheldLine } from '#app/domain/release-view.ts';

/** How much was withheld, by class; never what. */
export function WithheldCounts({ lines }: { readonly lines: readonly WithheldLine[] }) {
  return (
    <dl>
      {lines.map((line) => (
        <div key={line.label} className="flex items-baseline gap-4 border-b border-hair py-1.5">
          <dd className="w-6 flex-none font-serif text-account">{line.count}</dd>
          <dt>
            <span className="font-semibold">{line.label}</span>
            <span className="block text-axis text-second">{line.meaning}</span>
          </dt>
        </div>
      ))}
    </dl>
  );
}
