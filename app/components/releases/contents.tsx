import { documentParts } from './released-document.tsx';

/** Parts of the document, at its left. */
export function Contents({ title }: { readonly title: string }) {
  return (
    <nav aria-label={title} data-print="no">
      <p className="border-b-[1.5px] border-ink pb-1 text-small font-semibold">{title}</p>
      <ul>
        {documentParts.map((part) => (
          <li key={part.id} className="border-b border-hair">
            <a href={`#${part.id}`} className="flex min-h-8 items-center no-underline hover:underline">{part.label}</a>
          </li>
        ))}
      </ul>
    </nav>
  );
}
