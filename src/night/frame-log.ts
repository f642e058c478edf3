import { createHash } from 'node:crypto';

/** What is to be done with a file's content. */
export type Fate =
  | { readonly kind: 'new'; readonly index: number }
  /** The same file again with other content: it takes its earlier place. */
  | { readonly kind: 'replacement'; readonly index: number }
  /** Content that another file holds already. `freed`: the frame of what this file held before, held by none now. */
  | { readonly kind: 'known'; readonly freed: number | undefined }
  /** The same file with the content it had. */
  | { readonly kind: 'unchanged' };

interface Content {
  readonly index: number;
  readonly places: Set<string>;
}

/**
 * Knows which file is which: each content counts once, and a re-reduction replaces its earlier frame. A content stays
 * as long as any file holds it, so that a `latest.csv` beside numbered copies does not take the earlier frames along.
 */
export class FrameLog {
  private readonly hashes = new Map<string, string>();
  private readonly contents = new Map<string, Content>();
  private next = 0;

  /** `place` tells files apart: a name within one folder, else a path. */
  decide(place: string, bytes: Uint8Array): Fate {
    const hash = createHash('sha256').update(bytes).digest('hex');
    const before = this.hashes.get(place);
    if (before === hash) return { kind: 'unchanged' };
    this.hashes.set(place, hash);
    const freed = this.leave(place, before);
    const known = this.contents.get(hash);
    if (known !== undefined) {
      known.places.add(place);
      return { kind: 'known', freed };
    }
    const index = freed ?? this.next++;
    this.contents.set(hash, { index, places: new Set([place]) });
    return { kind: freed === undefined ? 'new' : 'replacement', index };
  }

  /** Takes a file off the content it held; returns that content's frame if no other file holds it. */
  private leave(place: string, hash: string | undefined): number | undefined {
    const content = hash === undefined ? undefined : this.contents.get(hash);
    if (hash === undefined || content === undefined) return undefined;
    content.places.delete(place);
    if (content.places.size > 0) return undefined;
    this.contents.delete(hash);
    return content.index;
  }
}
