import { Hatch } from '#app/components/ui/hatch.tsx';
import type { RedactedText } from '#app/domain/released-case.ts';
import { withheldLabels } from '#app/domain/released-case.ts';

/** Running text with blocks where words were taken out. */
export function RedactedWords({ text }: { readonly text: RedactedText }) {
  return (
    <span className="whitespace-pre-line">
      {text.map((piece, index) => ('text' in piece ? <span key={index}>{piece.text}</span> : <Hatch key={index} withheld={withheldLabels[piece.withheld]} />))}
    </span>
  );
}
