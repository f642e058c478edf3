/** The time of the night, which a replay lets run faster than the world's. */
export interface Clock {
  readonly now_ms: () => number;
}

/**
 * Night time = begins_ms + speed x (world time - startedAt_ms), standing still at ends_ms: plain numbers, so that two
 * threads can agree.
 */
export interface ClockSetting {
  readonly begins_ms: number;
  readonly ends_ms: number;
  readonly startedAt_ms: number;
  readonly speed: number;
}

export const REAL_TIME: ClockSetting = {
  begins_ms: 0,
  ends_ms: Number.POSITIVE_INFINITY,
  startedAt_ms: 0,
  speed: 1,
};

export function makeClock(setting: ClockSetting, world_ms: () => number = Date.now): Clock {
  const { begins_ms, ends_ms, startedAt_ms, speed } = setting;
  return { now_ms: () => Math.min(ends_ms, begins_ms + speed * (world_ms() - startedAt_ms)) };
}
