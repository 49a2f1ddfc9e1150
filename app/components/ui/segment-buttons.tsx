export interface SegmentButtonsProps {
  readonly label: string;
  readonly options: readonly { readonly value: string; readonly label: string }[];
  readonly chosen: string;
  readonly onChoose: (value: string) => void;
}

/** Buttons of which one is pressed: a choice of what is shown, not an answer that is sent. */
export function SegmentButtons({ label, options, chosen, onChoose }: SegmentButtonsProps) {
  return (
    <div role="group" aria-label={label} className="flex flex-wrap items-center gap-y-1">
      <span aria-hidden="true" className="pr-2.5 text-small text-second">{label}</span>
      {options.map((option) => (
        <button
          key={option.value}
          type="button"
          aria-pressed={option.value === chosen}
          className="-ml-px min-h-11 border-[1.5px] border-edge bg-sheet px-3 text-small aria-pressed:border-card-edge aria-pressed:bg-card aria-pressed:font-semibold aria-pressed:text-on-card"
          onClick={() => onChoose(option.value)}
        >
          {option.label}
        </button>
      ))}
    </div>
  );
}
