import type { Kind } from './kinds.js';

/** How one flag did, over all magnitudes and bin by bin. null: no star of the kind, or nothing raised. */
export interface RehearsedFlag {
  readonly flag: string;
  /** What deserves it; '' for flags that no drawn kind deserves. */
  readonly kind: string;
  /** Share of the stars of the kind that got the flag. */
  readonly completeness: number | null;
  /** Share of the stars with the flag that deserve it, in the natural mix of all kinds. */
  readonly purity: number | null;
  readonly bins: readonly {
    readonly from_mag: number;
    readonly drawn: number;
    readonly completeness: number | null;
    readonly purity: number | null;
  }[];
  /** Which other kinds got it: share of those who did not deserve it, largest first. */
  readonly imitators: readonly { readonly kind: string; readonly share: number }[];
}

interface Cell {
  drawn: number;
  found: number;
  deserved: number;
  undeserved: number;
}

/** Counts deserved and undeserved flags by magnitude; each star stands for `weight` of the natural mix. */
export class FlagTally {
  private readonly cells = new Map<string, Cell[]>();
  private readonly imitators = new Map<string, Map<string, number>>();

  constructor(
    private readonly edges_mag: readonly number[],
    private readonly kinds: readonly Kind[],
  ) {}

  add(kind: Kind, mag: number, raised: readonly string[], weight: number): void {
    const bin = this.edges_mag.findLastIndex(edge => mag >= edge);
    if (bin < 0 || bin >= this.edges_mag.length - 1) return;
    if (kind.flag !== '') this.cellsOf(kind.flag)[bin].drawn++;
    for (const code of raised) {
      const cell = this.cellsOf(code)[bin];
      if (code === kind.flag) {
        cell.found++;
        cell.deserved += weight;
        continue;
      }
      cell.undeserved += weight;
      const imitators = this.imitators.get(code) ?? new Map<string, number>();
      this.imitators.set(code, imitators.set(kind.name, (imitators.get(kind.name) ?? 0) + weight));
    }
  }

  flags(): readonly RehearsedFlag[] {
    return [...this.cells].map(([flag, cells]) => {
      const whole = cells.reduce(added, emptyCell());
      const imitators = [...(this.imitators.get(flag) ?? [])].sort((a, b) => b[1] - a[1]);
      return {
        flag,
        kind: this.kinds.find(kind => kind.flag === flag)?.name ?? '',
        completeness: completenessOf(whole),
        purity: purityOf(whole),
        bins: cells.map((cell, i) => ({
          from_mag: this.edges_mag[i],
          drawn: cell.drawn,
          completeness: completenessOf(cell),
          purity: purityOf(cell),
        })),
        imitators: imitators.map(([kind, weight]) => ({ kind, share: weight / whole.undeserved })),
      };
    });
  }

  private cellsOf(flag: string): Cell[] {
    const known = this.cells.get(flag);
    if (known !== undefined) return known;
    const made = Array.from({ length: this.edges_mag.length - 1 }, emptyCell);
    this.cells.set(flag, made);
    return made;
  }
}

function emptyCell(): Cell {
  return { drawn: 0, found: 0, deserved: 0, undeserved: 0 };
}

function added(sum: Cell, cell: Cell): Cell {
  return {
    drawn: sum.drawn + cell.drawn,
    found: sum.found + cell.found,
    deserved: sum.deserved + cell.deserved,
    undeserved: sum.undeserved + cell.undeserved,
  };
}

function completenessOf(cell: Cell): number | null {
  return cell.drawn > 0 ? cell.found / cell.drawn : null;
}

function purityOf({ deserved, undeserved }: Cell): number | null {
  return deserved + undeserved > 0 ? deserved / (deserved + undeserved) : null;
}
