import { useRouteLoaderData } from 'react-router';
import type { CaseHeaderView } from '#app/domain/case-view.ts';

/** The head of the open case, as its layout loaded it; for the tabs of a case. */
export function useCaseHeader(): CaseHeaderView {
  const header = useRouteLoaderData<CaseHeaderView>('routes/cases/case');
  if (!header) throw new Error('This part stands inside a case.');
  return header;
}
