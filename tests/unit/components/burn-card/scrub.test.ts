import { describe, expect, it } from 'vitest';
import { scrubTo } from '#app/components/burn-card/scrub.ts';

const minutes = Array.from({ length: 60 }, (_, index) => ({
  atUtc: new Date(Date.UTC(2026, 1, 3, 9, index)).toISOString(),
  verdict: index < 20 ? ('not-sunlit' as const) : index < 30 ? ('cannot-tell' as const) : ('sunlit' as const),
}));

describe('scrubTo', () => {
  it('moves one minute by arrow, ten with Shift, and stops at the ends', () => {
    expect(scrubTo(minutes, 5, 'ArrowRight', false)).toBe(6);
    expect(scrubTo(minutes, 5, 'ArrowLeft', true)).toBe(0);
    expect(scrubTo(minutes, 55, 'ArrowRight', true)).toBe(59);
    expect(scrubTo(minutes, 5, 'End', false)).toBe(59);
  });

  it('jumps to the next change of result by Page keys', () => {
    expect(scrubTo(minutes, 5, 'PageUp', false)).toBe(20);
    expect(scrubTo(minutes, 20, 'PageUp', false)).toBe(30);
    expect(scrubTo(minutes, 45, 'PageDown', false)).toBe(29);
    expect(scrubTo(minutes, 45, 'PageUp', false)).toBe(59);
  });

  it('leaves other keys alone', () => {
    expect(scrubTo(minutes, 5, 'a', false)).toBeNull();
  });
});
