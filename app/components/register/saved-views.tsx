import { Form } from 'react-router';
import type { RefusedForm } from '#app/components/cases/form-fields.ts';
import { formFields } from '#app/components/cases/form-fields.ts';
import { Refusal } from '#app/components/cases/refusal.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { AppLink } from '#app/components/ui/app-link.tsx';
import { Button } from '#app/components/ui/button.tsx';
import type { SavedView } from '#app/domain/saved-view.ts';

export interface SavedViewsProps {
  readonly views: readonly SavedView[];
  /** Filter of this page as it stands in the address; empty for everything in the usual order. */
  readonly search: string;
  readonly path: string;
  readonly problem: RefusedForm | undefined;
}

/** A person's own filters by name: open, rename, delete, and keep the present one. */
export function SavedViews({ views, search, path, problem }: SavedViewsProps) {
  const here = views.find((view) => view.search === search);
  return (
    <div className="flex flex-wrap items-center gap-x-5 gap-y-1 pb-2 text-small" data-print="no">
      {views.length > 0 ? <span className="text-second">Your views</span> : null}
      {views.map((view) => (
        <AppLink key={view.id} href={`${path}${view.search}`} {...(view.id === here?.id ? { 'aria-current': 'page' as const } : {})} className={`inline-flex min-h-11 items-center border-b-4 no-underline desk:min-h-8 ${view.id === here?.id ? 'border-here font-semibold' : 'border-transparent'}`}>{view.name}</AppLink>
      ))}
      <details key={`${here?.id ?? 'none'}${search}`} open={problem !== undefined} className="open:basis-full">
        <summary className="inline-flex min-h-11 items-center underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8">{here ? `Change "${here.name}"` : 'Keep this view'}</summary>
        <div className="max-w-md space-y-4 py-2">
          {here ? <ChangeView view={here} problem={problem} /> : <KeepView search={search} problem={problem} />}
        </div>
      </details>
    </div>
  );
}

function KeepView({ search, problem }: { readonly search: string; readonly problem: RefusedForm | undefined }) {
  const { refused, field } = formFields('save-view', problem);
  return (
    <Form method="post" className="space-y-2" preventScrollReset>
      <Refusal refused={refused} />
      <input type="hidden" name="intent" value="save-view" />
      <input type="hidden" name="search" value={search} />
      <TextInput field={field('name')} label="Name of this view" help="The filters and the order as they stand now. Only you see it." maxLength={60} required />
      <Button look="outlined">Keep it</Button>
    </Form>
  );
}

function ChangeView({ view, problem }: { readonly view: SavedView; readonly problem: RefusedForm | undefined }) {
  const { refused, field } = formFields('rename-view', problem);
  const removing = formFields('delete-view', problem);
  return (
    <>
      <Form method="post" className="space-y-2" preventScrollReset>
        <Refusal refused={refused} />
        <input type="hidden" name="intent" value="rename-view" />
        <input type="hidden" name="id" value={view.id} />
        <TextInput field={field('name', view.name)} label="Name of this view" maxLength={60} required />
        <Button look="outlined">Rename it</Button>
      </Form>
      <Form method="post" preventScrollReset>
        <Refusal refused={removing.refused} />
        <input type="hidden" name="intent" value="delete-view" />
        <input type="hidden" name="id" value={view.id} />
        <button type="submit" className="min-h-11 cursor-pointer underline decoration-ember decoration-2 underline-offset-4 desk:min-h-8">Delete this view; the cases stay</button>
      </Form>
    </>
  );
}
