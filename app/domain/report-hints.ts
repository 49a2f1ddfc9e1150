import { foldText } from './folded-text.ts';
import { tellingPatterns } from './telling-patterns.ts';

/** What the story seems to hold that belongs elsewhere: matched as redaction does, and only hinted at. */
export type StoryHint = 'health' | 'child' | 'personal';

const ofClass: Partial<Record<string, StoryHint>> = { health: 'health', child: 'child', email: 'personal', telephone: 'personal' };

/** Plain words that a reporter uses for an injury, besides those that redaction looks for. */
const plainHealthWords = /(?<![\p{L}])(?:injur\w*|hurt|wound\w*|blister\w*|doctor|nurse|first aid|dizz\w*|faint\w*)(?![\p{L}])/u;

export function storyHints(story: string): readonly StoryHint[] {
  const { folded, original } = foldText(story);
  const hints = new Set<StoryHint>();
  for (const { id, pattern, accepts } of tellingPatterns) {
    const hint = ofClass[id];
    if (!hint) continue;
    const found = [...folded.matchAll(pattern)].some((match) => accepts?.(match[0], original, folded.slice(match.index + match[0].length)) ?? true);
    if (found) hints.add(hint);
  }
  if (plainHealthWords.test(folded)) hints.add('health');
  return [...hints];
}
