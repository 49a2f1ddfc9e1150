import { StateMark } from '#app/components/ui/state-mark.tsx';
import type { MarkedState } from '#app/components/ui/state-mark.tsx';

export interface ProgressLineStep {
  readonly state: MarkedState;
  /** Plain name of the step. */
  readonly name: string;
  readonly words: string;
  /** "9 May 2026, 15:41", "now", or empty. */
  readonly when: string;
  readonly reached: boolean;
}

/** States as a line; the part that is still to come is dashed. */
export function ProgressLine({ steps }: { readonly steps: readonly ProgressLineStep[] }) {
  return (
    <ol>
      {steps.map((step, index) => (
        <li key={step.state} className={`relative pb-5 ${step.reached ? '' : 'text-second'}`}>
          {index < steps.length - 1 ? (
            <span aria-hidden="true" className={`absolute top-6 bottom-0 left-[7.25px] border-l-[1.5px] border-current ${steps[index + 1]?.reached ? '' : 'border-dashed'}`} />
          ) : null}
          <StateMark state={step.state} word={step.name} {...(step.when ? { note: step.when } : {})} />
          <p className="pl-6">{step.reached ? null : <span className="sr-only">Still to come: </span>}{step.words}</p>
        </li>
      ))}
    </ol>
  );
}
