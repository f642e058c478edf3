import { createHash } from 'node:crypto';

/** What is to be done with a file's content. */
export type Fate =
  | { readonly kind: 'new'; readonly index: number }
  /** The same file again with other content: it takes its earlier place. */
  | { readonly kind: 'replacement'; readonly index: number }
  /** Content that was already read, under this or another name. */
  | { readonly kind: 'known'; readonly as: string };

/** Knows which file is which: each content counts once, and a re-reduction replaces its earlier frame. */
export class FrameLog {
  private readonly byName = new Map<string, { readonly index: number; readonly hash: string }>();
  private readonly byHash = new Map<string, string>();
  private next = 0;

  decide(name: string, bytes: Uint8Array): Fate {
    const hash = createHash('sha256').update(bytes).digest('hex');
    const holder = this.byHash.get(hash);
    if (holder !== undefined) return { kind: 'known', as: holder };
    const earlier = this.byName.get(name);
    if (earlier !== undefined) this.byHash.delete(earlier.hash);
    const index = earlier?.index ?? this.next++;
    this.byName.set(name, { index, hash });
    this.byHash.set(hash, name);
    return { kind: earlier === undefined ? 'new' : 'replacement', index };
  }
}
