import type { DemoCase } from '#fixtures/demo/demo-case.ts';

/** Releases of the demonstration cases to their insurer. */
export function seedReleases(demoCases: readonly DemoCase[]): Promise<void> {
  return Promise.resolve(void demoCases);
}
