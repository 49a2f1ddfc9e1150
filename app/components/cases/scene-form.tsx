import { useRef, useState } from 'react';
import type { ReactNode } from 'react';
import { Form, useSubmit } from 'react-router';
import { ErrorSummary } from '#app/components/forms/error-summary.tsx';
import { TextInput } from '#app/components/forms/text-field.tsx';
import { FixedBar } from '#app/components/layout/page.tsx';
import { useHydrated } from '#app/components/report/use-hydrated.ts';
import { Button } from '#app/components/ui/button.tsx';
import { Notice } from '#app/components/ui/notice.tsx';
import type { SceneOpticKind } from '#app/domain/scene.ts';
import { allSceneFields, fieldName } from '#app/domain/scene-fields.ts';
import { workedOut } from '#app/domain/scene-worked-out.ts';
import { formFields } from './form-fields.ts';
import type { RefusedForm } from './form-fields.ts';
import { NorthPart } from './north-part.tsx';
import type { NorthFacts } from './north-part.tsx';
import { AirPart, MarkPart, OpeningPart, OpticPart } from './scene-parts.tsx';
import { teamAnswers } from './taken-along.ts';
import type { FormDraft } from './use-form-draft.ts';
import { useFormDraft } from './use-form-draft.ts';

export interface SceneFormProps {
  readonly kind: SceneOpticKind;
  readonly stored: Readonly<Record<string, string>>;
  /** Who and when of each stored number, by field name. */
  readonly stamps: Readonly<Record<string, string>>;
  readonly baseVersion: number;
  readonly storageKey: string;
  readonly measurer: string;
  readonly north: NorthFacts;
  /** What is on record on the other pages, in words. */
  readonly around: { readonly skyline: string; readonly weather: string };
  readonly problem: RefusedForm | undefined;
}

const otherNames: Readonly<Record<string, string>> = { measuredOn: 'Day of the measurements', 'target.layers': 'Layers', 'air.temperatureC': 'Air temperature', 'air.pressureHpa': 'Air pressure', 'opening.halfWidthDeg': 'Open to each side', 'skyline.points': 'Skyline', walls: 'Walls', 'dni.values': 'Sun strength', note: 'What was measured' };
/** Kept as they are: they have pages of their own. */
const carriedNames = ['skyline.points', 'skyline.plusMinusDeg', 'skyline.source', 'walls', 'dni.values', 'dni.source', 'dni.basis', 'dni.stationDistanceKm'] as const;

/** The measured scene, part by part in the order of the paper sheet, saved together as a new version. */
export function SceneForm({ kind, stored, stamps, baseVersion, storageKey, measurer, north, around, problem }: SceneFormProps) {
  const { field: fieldOf, refused } = formFields('save-scene', problem, 'scene');
  const form = useRef<HTMLFormElement>(null);
  const [noSignal, setNoSignal] = useState(false);
  const draft = useFormDraft({ form, storageKey, baseVersion, mending: refused !== undefined, first: stored });
  const field = (name: string) => fieldOf(name, stored[name]);
  const labels = [...allSceneFields.map((one) => ({ field: field(fieldName(one)), label: one.label })), ...Object.entries(otherNames).map(([name, label]) => ({ field: field(name), label }))];
  const follows = workedOut(draft.values);
  const submit = useSubmit();
  /** Without a signal the words stay here; a failed request would throw the page away. */
  const saveWhenReached = async (element: HTMLFormElement) => {
    draft.keep();
    const answers = await teamAnswers();
    setNoSignal(!answers);
    if (!answers) return;
    draft.markSent();
    await submit(element, { preventScrollReset: true });
  };
  return (
    <Form
      method="post"
      ref={form}
      className="space-y-7"
      preventScrollReset
      onInput={draft.keep}
      onSubmit={(event) => {
        event.preventDefault();
        void saveWhenReached(event.currentTarget);
      }}
    >
      {refused ? <ErrorSummary errors={refused.formErrors} fields={labels} /> : null}
      {draft.olderVersion === null ? null : <OlderWords draft={draft} baseVersion={baseVersion} />}
      <input type="hidden" name="intent" value="save-scene" />
      <input type="hidden" name="baseVersion" value={baseVersion} />
      {carriedNames.map((name) => <input key={name} type="hidden" name={name} value={stored[name] ?? ''} />)}
      <NorthPart field={field} north={north} measurer={measurer} />
      <OpticPart kind={kind} field={field} stamps={stamps} follows={follows} />
      <OpeningPart field={field} stamps={stamps} follows={follows} />
      <MarkPart field={field} stamps={stamps} follows={follows} />
      <AirPart field={field} around={around} />
      <TextInput field={field('note')} label="What was measured or changed, and by whom" help="Kept with the version and in the log." maxLength={500} required />
      <SaveBar draft={draft} noSignal={noSignal} save={<Button>Save as version {baseVersion + 1}</Button>} />
    </Form>
  );
}

function OlderWords({ draft, baseVersion }: { readonly draft: FormDraft; readonly baseVersion: number }) {
  return (
    <Notice title="Numbers are waiting on this device" role="note">
      <p className="pb-2">They were typed on version {draft.olderVersion} and never sent. Version {baseVersion} has been saved since.</p>
      <div className="flex flex-wrap gap-3">
        <Button type="button" look="outlined" onClick={draft.putIn}>Put them into the form</Button>
        <Button type="button" look="quiet" onClick={draft.throwAway}>Throw them away</Button>
      </div>
    </Notice>
  );
}

function SaveBar({ draft, noSignal, save }: { readonly draft: FormDraft; readonly noSignal: boolean; readonly save: ReactNode }) {
  const hydrated = useHydrated();
  if (!hydrated || (draft.savedAt === null && !draft.unkept)) return save;
  const title = draft.unkept ? 'Not kept on this device: save before you leave' : `Kept on this device, ${draft.savedAt}`;
  return (
    <>
      <div className="h-20" aria-hidden="true" />
      <FixedBar title={title} detail={noSignal ? 'No signal. Save again when it is back; nothing is lost.' : 'Not with the team yet.'} onPhone={!draft.unkept} action={save} />
    </>
  );
}
