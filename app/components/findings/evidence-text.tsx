import { href } from 'react-router';
import { AppLink } from '#app/components/ui/app-link.tsx';

export interface EvidenceTextProps {
  readonly text: string;
  readonly caseNumber: number;
}

const reference = /\b(run|reconstruction|photo) (\d{1,4})\b/giu;

/** Lines as a person wrote them; "run 4" and "photo 3" lead to what they name. */
export function EvidenceText({ text, caseNumber }: EvidenceTextProps) {
  const lines = text.split(/\n+/u).filter((line) => line.trim() !== '');
  if (lines.length === 0) return <p className="text-second">none found</p>;
  return (
    <ul className="space-y-1">
      {lines.map((line, index) => <li key={`${index}-${line}`}><Line line={line} caseNumber={caseNumber} /></li>)}
    </ul>
  );
}

function Line({ line, caseNumber }: { readonly line: string; readonly caseNumber: number }) {
  const pieces = [];
  let from = 0;
  for (const match of line.matchAll(reference)) {
    const [words, kind = '', number = ''] = match;
    pieces.push(line.slice(from, match.index), <AppLink key={match.index} href={placeOf(kind.toLowerCase(), number, caseNumber)}>{words}</AppLink>);
    from = match.index + words.length;
  }
  return <>{pieces}{line.slice(from)}</>;
}

function placeOf(kind: string, number: string, caseNumber: number): string {
  const caseParam = String(caseNumber);
  return kind === 'photo' ? `${href('/cases/:caseNumber/photos', { caseNumber: caseParam })}#photo-${number}` : href('/cases/:caseNumber/reconstructions/:number', { caseNumber: caseParam, number });
}
