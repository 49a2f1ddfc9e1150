import { ChipGroup } from '#app/components/ui/chip-group.tsx';
import { Hatch } from '#app/components/ui/hatch.tsx';
import type { PhotoMask } from '#app/domain/photo.ts';
import type { LineDecision } from '#app/domain/redaction.ts';
import type { MarkedPiece } from '#app/domain/redact-text.ts';
import { withheldLabels } from '#app/domain/released-case.ts';
import { decisionField } from '#app/domain/release-form.ts';

/** Columns of the page on which a release is prepared; on a phone one follows the other. */
export const deskColumns = 'grid gap-x-6 gap-y-2 tablet:grid-cols-[minmax(0,1fr)_minmax(0,1fr)_10.5rem]';

export interface LineRowProps {
  readonly number: number;
  readonly label: string;
  readonly fieldKey: string;
  readonly pieces: readonly MarkedPiece[];
  readonly chosen: LineDecision | null;
}

/** A line as written beside the line as its reader gets it, and the decision. */
export function LineRow({ number, label, fieldKey, pieces, chosen }: LineRowProps) {
  const found = [...new Set(pieces.flatMap((piece) => (piece.withheld ? [withheldLabels[piece.withheld]] : [])))];
  return (
    <li className={`${deskColumns} border-b border-hair py-3 ${chosen === null ? 'border-l-4 border-l-ink pl-3' : ''}`}>
      <div className="min-w-0">
        <p className="text-axis text-second">{number} {label}</p>
        <p className="font-serif text-account whitespace-pre-line">
          {pieces.map((piece, index) => (piece.withheld ? <mark key={index} className="border border-ink bg-transparent px-0.5 text-ink">{piece.text}</mark> : <span key={index}>{piece.text}</span>))}
        </p>
      </div>
      <div className="min-w-0 bg-sheet tablet:px-3">
        <p className="text-axis text-second">As the reader gets it, if shared</p>
        <p className="font-serif text-account whitespace-pre-line">
          {pieces.map((piece, index) => (piece.withheld ? <Hatch key={index} withheld={withheldLabels[piece.withheld]} /> : <span key={index}>{piece.text}</span>))}
        </p>
      </div>
      <Decision number={number} label={label} fieldKey={fieldKey} chosen={chosen} note={found.length === 0 ? 'nothing found' : `found: ${found.join(', ')}`} />
    </li>
  );
}

interface DecisionProps {
  readonly number: number;
  readonly label: string;
  readonly fieldKey: string;
  readonly chosen: LineDecision | null;
  readonly note: string;
}

function Decision({ number, label, fieldKey, chosen, note }: DecisionProps) {
  return (
    <fieldset className="min-w-0 [&_.chip]:whitespace-nowrap">
      <legend className="text-axis text-second"><span className="sr-only">{number} {label}: </span>{note}</legend>
      <ChipGroup
        name={decisionField(fieldKey)}
        idPrefix={`decide-${number}-${fieldKey.replace(/[^a-z0-9]/giu, '')}`}
        options={[{ value: 'share', label: 'Share' }, { value: 'hold-back', label: 'Hold back' }]}
        {...(chosen === null ? {} : { chosen })}
      />
      {chosen === null ? <p className="pt-1 text-axis text-second">undecided: held back</p> : null}
    </fieldset>
  );
}

export interface PhotoRowProps {
  readonly number: number;
  readonly fieldKey: string;
  readonly photoId: string;
  readonly label: number;
  readonly viewWords: string;
  readonly alternative: string;
  readonly masks: readonly PhotoMask[];
  readonly releasable: 'undecided' | 'yes' | 'no';
  readonly chosen: LineDecision | null;
  readonly sheetHref: string;
}

/** A photo with its boxes beside the photo as it leaves. Boxes are drawn on the photo sheet. */
export function PhotoRow({ number, fieldKey, photoId, label, viewWords, alternative, masks, releasable, chosen, sheetHref }: PhotoRowProps) {
  const sheet = <a href={`${sheetHref}#photo-${photoId}`} className="inline-flex min-h-6 items-center text-small">Boxes, on the photo sheet</a>;
  return (
    <li className={`${deskColumns} border-b border-hair py-3 ${chosen === null ? 'border-l-4 border-l-ink pl-3' : ''}`}>
      <figure className="min-w-0">
        <Boxed photoId={photoId} alternative={alternative} masks={masks} look="outline" />
        <figcaption className="pt-1 text-small">{number} Photo {label}, {viewWords}</figcaption>
      </figure>
      <figure className="min-w-0">
        {releasable === 'yes' ? (
          <Boxed photoId={photoId} alternative={`As it leaves: ${alternative}`} masks={masks} look="solid" />
        ) : (
          <div className="hatch border border-ink"><div aria-hidden="true" className="hatch-lines h-24" /><p className="border-t border-ink bg-sheet px-3 py-1.5 text-small">{releasable === 'no' ? 'Stays in the house, says the photo sheet.' : 'Held back: the photo sheet does not say yet that it may leave.'}</p></div>
        )}
        <figcaption className="pt-1 text-small text-second">{releasable === 'yes' ? `As the reader sees it, if shared: photo-${String(label).padStart(2, '0')}.jpg` : 'Held back'}</figcaption>
      </figure>
      {releasable === 'yes' ? (
        <div>
          <Decision number={number} label={`Photo ${label}`} fieldKey={fieldKey} chosen={chosen} note={masks.length === 0 ? 'no box' : `${masks.length} ${masks.length === 1 ? 'box' : 'boxes'}`} />
          {sheet}
        </div>
      ) : <p>{sheet}</p>}
    </li>
  );
}

const percent = (share: number): string => `${share * 100}%`;

function Boxed({ photoId, alternative, masks, look }: { readonly photoId: string; readonly alternative: string; readonly masks: readonly PhotoMask[]; readonly look: 'outline' | 'solid' }) {
  return (
    <div className="relative bg-wash">
      <img src={`/photos/${photoId}/view`} alt={alternative} loading="lazy" className="block w-full" />
      {masks.map((mask, index) => (
        <span
          key={index}
          aria-hidden="true"
          className={`pointer-events-none absolute ${look === 'outline' ? 'border-2 border-ink outline-2 outline-pale' : 'bg-[#1c2430]'}`}
          style={{ left: percent(mask.leftShare), top: percent(mask.topShare), width: percent(mask.widthShare), height: percent(mask.heightShare) }}
        />
      ))}
    </div>
  );
}
