import type { StoryHint } from '#app/domain/report-hints.ts';
import { storyHints } from '#app/domain/report-hints.ts';

const words: Record<StoryHint, string> = {
  health: 'This looks like something about an injury. Please take it out of the story: say Yes to “Was anyone hurt?” and use the injury box there.',
  child: 'This looks like it is about a child. Say only what is needed, and no name.',
  personal: 'This looks like a phone number or an e-mail address. Please leave it out of the story.',
};

/** Says at once what belongs elsewhere. It stops nobody from sending. */
export function StoryHintLine({ story }: { readonly story: string }) {
  const hints = story === '' ? [] : storyHints(story);
  return (
    <div role="status" className="empty:hidden">
      {hints.length > 0 ? <p className="border-l-6 border-ink py-1 pl-4 text-small">{hints.map((hint) => words[hint]).join(' ')}</p> : null}
    </div>
  );
}
