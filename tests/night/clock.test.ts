import { describe, expect, it } from 'vitest';
import { makeClock, REAL_TIME } from '../../src/night/clock.js';

describe('the clock of a night', () => {
  it("is the world's when nothing is replayed", () => {
    expect(makeClock(REAL_TIME, () => 1_794_175_200_123).now_ms()).toBe(1_794_175_200_123);
  });

  it('runs faster in a replay, and stands still at the end', () => {
    let world_ms = 5000;
    const setting = { begins_ms: 1_000_000, ends_ms: 2_000_000, startedAt_ms: 5000, speed: 100 };
    const clock = makeClock(setting, () => world_ms);
    expect(clock.now_ms()).toBe(1_000_000);
    world_ms += 2500;
    expect(clock.now_ms()).toBe(1_250_000);
    world_ms += 1_000_000;
    expect(clock.now_ms()).toBe(2_000_000);
  });

  it('two clocks of one setting agree: nothing but numbers goes to the other thread', () => {
    const setting = { begins_ms: 7, ends_ms: 1e9, startedAt_ms: 3, speed: 360 };
    const copy = structuredClone(setting);
    expect(makeClock(copy, () => 99).now_ms()).toBe(makeClock(setting, () => 99).now_ms());
  });
});
