/** The time of the night, which a replay lets run faster than the world's. */
export interface Clock {
  readonly now_ms: () => number;
}

/** Night time = begins_ms + speed x (world time - startedAt_ms): plain numbers, so that two threads can agree. */
export interface ClockSetting {
  readonly begins_ms: number;
  readonly startedAt_ms: number;
  readonly speed: number;
}

export const REAL_TIME: ClockSetting = { begins_ms: 0, startedAt_ms: 0, speed: 1 };

export function makeClock(setting: ClockSetting, world_ms: () => number = Date.now): Clock {
  return { now_ms: () => setting.begins_ms + setting.speed * (world_ms() - setting.startedAt_ms) };
}
