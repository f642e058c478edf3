import type { NightView, StarDetail } from '../../night/view.js';
import type { KeyPress } from '../terminal/key-press.js';

/** Everything that can happen to the screens. */
export type ScreenEvent =
  | { readonly kind: 'key'; readonly key: KeyPress }
  | { readonly kind: 'view'; readonly view: NightView }
  | { readonly kind: 'detail'; readonly detail: StarDetail }
  /** The watched directory has gone or come back. */
  | { readonly kind: 'folder'; readonly present: boolean }
  | { readonly kind: 'tick'; readonly now_ms: number }
  | { readonly kind: 'resize'; readonly columns: number; readonly rows: number };

/** What the screens ask of the rest of the program. */
export type ScreenEffect =
  | { readonly kind: 'quit' }
  | { readonly kind: 'ask-detail'; readonly star: number }
  /** Draw every cell again: something else may have written to the terminal. */
  | { readonly kind: 'redraw' };

export interface Step<State> {
  readonly state: State;
  readonly effects: readonly ScreenEffect[];
}
