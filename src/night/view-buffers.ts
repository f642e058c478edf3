import type { NightView } from './view.js';

/** The arrays of a view that can be handed over instead of copied: its star columns, made for it alone. */
export function viewBuffers(view: NightView): ArrayBuffer[] {
  return Object.values(view.stars).flatMap(value =>
    ArrayBuffer.isView(value) && value.buffer instanceof ArrayBuffer ? [value.buffer] : [],
  );
}
