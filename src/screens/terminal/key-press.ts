export type KeyName =
  | 'char'
  | 'up'
  | 'down'
  | 'left'
  | 'right'
  | 'pageup'
  | 'pagedown'
  | 'home'
  | 'end'
  | 'return'
  | 'escape'
  | 'tab'
  | 'backspace'
  | 'delete'
  | 'insert';

/** One key, or one paste, as the handlers see it. */
export type KeyPress =
  | {
      readonly name: KeyName;
      /** The character, for name 'char'; with ctrl the letter in lower case. */
      readonly char: string;
      readonly ctrl: boolean;
      readonly meta: boolean;
      readonly shift: boolean;
    }
  | { readonly name: 'paste'; readonly text: string };

/** A plain key without modifiers. */
export function plainKey(name: KeyName, char = ''): Exclude<KeyPress, { readonly name: 'paste' }> {
  return { name, char, ctrl: false, meta: false, shift: false };
}
