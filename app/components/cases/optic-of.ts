import type { OpticDrawingKind } from '#app/components/optics/optic-drawing.tsx';
import type { SceneOpticKind } from '#app/domain/scene.ts';

/** Drawing of an optic; water on a dome is drawn as the bowl that it is. */
export const opticDrawingOf = (kind: SceneOpticKind): OpticDrawingKind => (kind === 'water-on-dome' ? 'bowl-or-vase' : kind);
