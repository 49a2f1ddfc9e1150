import type { WithheldLine } from '#app/domain/release-view.ts';

/** How much was withheld, by class; never what. */
export function WithheldCounts({ lines }: { readonly lines: readonly WithheldLine[] }) {
  return (
    <dl>
      {lines.map((line) => (
        <div key={line.label} className="flex items-baseline gap-4 border-b border-hair py-1.5">
          <dt className="order-2">
            <span className="font-semibold">{line.label}</span>
            <span className="block text-axis text-second">{line.meaning}</span>
          </dt>
          <dd className="order-1 w-6 flex-none font-serif text-account">{line.count}</dd>
        </div>
      ))}
    </dl>
  );
}
