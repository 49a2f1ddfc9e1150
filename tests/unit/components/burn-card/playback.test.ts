import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { playFrom, playWindowMs, playedTo } from '#app/components/burn-card/playback.ts';

const glide = (elapsedMs: number, more: { fromIndex?: number; count?: number } = {}) => playedTo({ fromIndex: 0, count: 241, reducedMotion: false, elapsedMs, ...more });
const jump = (elapsedMs: number, more: { fromIndex?: number; count?: number } = {}) => playedTo({ fromIndex: 0, count: 241, reducedMotion: true, elapsedMs, ...more });

describe('the line that goes by itself', () => {
  it('takes about twelve seconds for the whole window, however long that is', () => {
    for (const count of [20, 241, 1_440]) {
      expect(glide(playWindowMs / 2, { count })).toBe(Math.floor((count - 1) / 2));
      expect(glide(playWindowMs - 1, { count })).toBeLessThan(count - 1);
      expect(glide(playWindowMs, { count })).toBe(count - 1);
    }
    expect(playWindowMs).toBe(12_000);
  });

  it('stops at the end, wherever it started', () => {
    expect(glide(60_000, { fromIndex: 200 })).toBe(240);
    expect(glide(3_000, { fromIndex: 100 })).toBe(160);
    expect(jump(60_000, { fromIndex: 235 })).toBe(240);
  });

  it('jumps ten minutes once a second for readers who asked for less movement, and rests between', () => {
    expect([0, 999, 1_000, 1_999, 2_000].map((ms) => jump(ms))).toEqual([0, 0, 10, 10, 20]);
  });

  it('never goes back and never leaves the window', () => {
    fc.assert(fc.property(fc.nat(1_440), fc.nat(1_440), fc.nat(40_000), fc.nat(1_000), fc.boolean(), (count, from, elapsedMs, later, reducedMotion) => {
      const fromIndex = playFrom(from, count);
      const at = (ms: number) => playedTo({ fromIndex, elapsedMs: ms, count, reducedMotion });
      expect(at(elapsedMs)).toBeGreaterThanOrEqual(Math.min(fromIndex, Math.max(0, count - 1)));
      expect(at(elapsedMs + later)).toBeGreaterThanOrEqual(at(elapsedMs));
      expect(at(elapsedMs)).toBeLessThanOrEqual(Math.max(0, count - 1));
    }));
  });

  it('starts where the line stands, and anew from the end', () => {
    expect(playFrom(30, 241)).toBe(30);
    expect(playFrom(240, 241)).toBe(0);
    expect(playFrom(-1, 241)).toBe(0);
  });
});
