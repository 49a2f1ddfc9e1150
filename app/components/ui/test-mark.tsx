import type { ReactNode } from 'react';

export type TestMarkResult = 'supports' | 'contradicts' | 'inconclusive' | 'not tested';

const words: Record<TestMarkResult, string> = {
  supports: 'Supports',
  contradicts: 'Contradicts',
  inconclusive: 'Inconclusive',
  'not tested': 'Not tested',
};
const shapes: Record<TestMarkResult, ReactNode> = {
  supports: <path d="M8 2.5v11M2.5 8h11" strokeWidth="2.2" />,
  contradicts: <path d="M2.5 8h11" strokeWidth="2.4" />,
  inconclusive: <path d="M2.5 9.2c1.6-3.4 3.8-3.4 5.5-1.2s3.9 2.2 5.5-1.2" strokeWidth="2" />,
  'not tested': <path d="M3 3h10v10H3Z" strokeWidth="1.6" strokeDasharray="1.6 1.9" />,
};

export interface TestMarkProps {
  readonly result: TestMarkResult;
  /** Name of the test in place of the result word; the result is then read out after it. */
  readonly label?: string;
  /** Why it was not tested. */
  readonly why?: ReactNode;
}

/** Plus, bar, wave or dotted square with its word. Each test stands alone; there is no total. */
export function TestMark({ result, label, why }: TestMarkProps) {
  return (
    <span className="inline-flex items-start gap-2">
      <svg width="16" height="16" viewBox="0 0 16 16" aria-hidden="true" className="mt-[0.125em] flex-none" fill="none" stroke="currentColor">
        {shapes[result]}
      </svg>
      <span>
        {label ?? words[result]}
        {label ? <span className="sr-only">: {words[result].toLowerCase()}</span> : null}
        {why ? <span className="block text-axis text-second">{why}</span> : null}
      </span>
    </span>
  );
}
