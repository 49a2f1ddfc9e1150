import type { Sighting } from './incident.ts';
import type { SceneOpticKind, TargetMaterial } from './scene.ts';
import { sceneOpticLabels, targetMaterialLabels } from './scene.ts';

const nouns: Record<Sighting, string> = {
  mark: 'Mark',
  melted: 'Melted or bent part',
  'bright-patch': 'Bright patch',
  'smoke-or-fire': 'Smoke or fire',
  'dont-know': 'Something seen',
};

const longestPlace = 60;

/**
 * Title of a new case, from what was ticked and where: "Mark on single-ply roof membrane, north parapet". It holds no
 * words of the account, so that no name slips into a heading. People can write a better one later.
 */
export function caseTitle(facts: { readonly sighting: Sighting; readonly placeDetail: string; readonly siteName: string; readonly material?: TargetMaterial; readonly opticKind?: SceneOpticKind }): string {
  const on = facts.material && facts.material !== 'dont-know' ? ` on ${targetMaterialLabels[facts.material].toLowerCase()}` : '';
  const near = !on && facts.opticKind && facts.opticKind !== 'dont-know' ? ` near ${sceneOpticLabels[facts.opticKind].toLowerCase()}` : '';
  const place = shortened(facts.placeDetail.trim()) || facts.siteName;
  return `${nouns[facts.sighting]}${on}${near}, ${place}`;
}

/** First line, cut at a word. */
function shortened(text: string): string {
  const line = (text.split('\n')[0] ?? '').trim();
  if (line.length <= longestPlace) return line;
  const cut = line.slice(0, longestPlace);
  return cut.slice(0, cut.lastIndexOf(' ') > 20 ? cut.lastIndexOf(' ') : longestPlace).replace(/[,;:.]$/u, '');
}
