import { useState } from 'react';

export type SceneValues = Readonly<Record<string, string>>;

/** Values of the scene while they are drawn and typed, with a way back. */
export interface SceneEdit {
  readonly values: SceneValues;
  /** Handle or row that was touched last. */
  readonly chosen: string | null;
  readonly choose: (key: string | null) => void;
  readonly put: (more: SceneValues) => void;
  /** Keeps what stands now, to come back to. */
  readonly remember: () => void;
  readonly undo: () => void;
  readonly undoable: number;
}

const mostSteps = 100;

export function useSceneEdit(first: SceneValues): SceneEdit {
  const [values, setValues] = useState(first);
  const [chosen, setChosen] = useState<string | null>(null);
  const [past, setPast] = useState<readonly SceneValues[]>([]);
  return {
    values,
    chosen,
    choose: setChosen,
    put: (more) => setValues((before) => ({ ...before, ...more })),
    remember: () => setPast((steps) => (steps.at(-1) === values ? steps : [...steps.slice(-mostSteps), values])),
    undo: () => {
      const before = past.at(-1);
      if (!before) return;
      setPast(past.slice(0, -1));
      setValues(before);
    },
    undoable: past.length,
  };
}
