import { useEffect, useState } from 'react';
import { momentFields, passField } from '#app/domain/report-fields.ts';

const asked = ['siteId', 'latitudeDeg', 'longitudeDeg', 'opticFacesDeg', 'foundWhen', 'foundNowAt', 'longWindowConfirmed', ...momentFields.flatMap((name) => [name, passField(name)])];
/** How long a pause in typing is. [ms] */
const pauseMs = 700;

interface Said {
  readonly question: string;
  readonly sentences: readonly string[];
  readonly check: boolean;
}

/** Nothing where the answer is not one of ours: the line is a help, and never in the way. */
function readAnswer(question: string, answer: unknown): Said | null {
  if (typeof answer !== 'object' || answer === null || !('sentences' in answer) || !Array.isArray(answer.sentences)) return null;
  return { question, sentences: answer.sentences.filter((one): one is string => typeof one === 'string'), check: 'check' in answer && answer.check === true };
}

export interface SunPreviewLineProps {
  readonly values: Readonly<Record<string, string>>;
  readonly guestCode: string | null;
}

/** What the sun did in the stated time, from our own interface, after a pause in typing. Silent without a connection. */
export function SunPreviewLine({ values, guestCode }: SunPreviewLineProps) {
  const [said, setSaid] = useState<Said | null>(null);
  const stated = values['foundWhen'] && values['foundWhen'] !== '' && (values['siteId'] || values['latitudeDeg']);
  const query = new URLSearchParams({ ...(guestCode ? { at: guestCode } : {}), ...Object.fromEntries(asked.flatMap((name) => (values[name] ? [[name, values[name]]] : []))) });
  const question = stated ? query.toString() : '';
  useEffect(() => {
    if (question === '' || !navigator.onLine) return undefined;
    const stop = new AbortController();
    const timer = setTimeout(() => {
      fetch(`/report/sun?${question}`, { signal: stop.signal })
        .then(async (response) => (response.ok ? readAnswer(question, await response.json()) : null))
        .then(setSaid)
        // No connection, or the answer is no longer wanted: the report goes on without the line.
        .catch(() => undefined);
    }, pauseMs);
    return () => {
      clearTimeout(timer);
      stop.abort();
    };
  }, [question]);
  const current = said?.question === question ? said : null;
  return (
    <div role="status" className="empty:hidden">
      {current && current.sentences.length > 0 ? (
        <p className={current.check ? 'border-l-6 border-ink py-1 pl-4 font-semibold' : 'text-small text-second'}>{current.sentences.join(' ')}</p>
      ) : null}
    </div>
  );
}
