import { fieldIds } from './field-like.ts';
import type { FieldLike } from './field-like.ts';

export interface ErrorSummaryProps {
  /** Errors of the whole form. */
  readonly errors?: readonly string[] | undefined;
  /** Fields in the order of the page; those without errors are left out. */
  readonly fields?: readonly { readonly field: FieldLike; readonly label: string }[];
  readonly title?: string;
}

/** Stands above the form after a failed save and leads to each field. Nothing that was typed is lost. */
export function ErrorSummary({ errors = [], fields = [], title = 'Not saved yet. What you typed is still here.' }: ErrorSummaryProps) {
  const wrong = fields.filter(({ field }) => (field.errors?.length ?? 0) > 0);
  if (errors.length === 0 && wrong.length === 0) return null;
  return (
    <div role="alert" tabIndex={-1} className="border-2 border-l-7 border-ink bg-sheet px-4 py-3">
      <p className="font-semibold">{title}</p>
      <ul className="mt-1.5 space-y-1.5">
        {errors.map((error) => <li key={error}>{error}</li>)}
        {wrong.map(({ field, label }) => (
          <li key={field.name}>
            <a href={`#${fieldIds(field).id}`}>{label}</a>: {field.errors?.join(' ')}
          </li>
        ))}
      </ul>
    </div>
  );
}
