import { type FSWatcher as FolderHandle, watch as watchFolder } from 'node:fs';
import { lstat, readdir, stat } from 'node:fs/promises';
import { basename, dirname, join, resolve } from 'node:path';
import { type FSWatcher, watch as watchParent } from 'chokidar';
import { type Glance, isComplete } from './completeness.js';
import { glance, isRefusal, type Refusal, readWhole } from './safe-file.js';
import { reachesItsEnd } from './self-ending.js';

export interface WatchHandlers {
  /** A finished file, or one that changed since it was read. Awaited before the next is read. */
  readonly onFile: (name: string, bytes: Uint8Array) => Promise<void> | void;
  readonly onRefused: (name: string, refusal: Refusal) => void;
  /** The folder is there (true) or gone (false). */
  readonly onFolder: (present: boolean) => void;
  /** Nothing waits to be read. */
  readonly onIdle: () => void;
}

/** Names that writers use for what is not finished, and hidden files. */
const UNFINISHED = /^\.|~$|\.(?:tmp|temp|part|partial|filepart|crdownload|swp|lock)$/i;

/** A waiting file as it is, since when, and whether it has still to be looked into for its end. */
interface Sighting {
  readonly key: string;
  readonly since_ms: number;
  ending: 'not-looked-for' | 'still-growing' | 'not-reached';
}

const SETTLE_MS = 10;
const RECHECK_MS = 40;
const RELIST_MS = 5000;
const POLL_MS = 2000;

/**
 * Watches one folder for photometry files. The system's notices say where to look at once; a full list every few
 * seconds catches what they miss, and is all there is on network file systems (`poll`). The folder's parent is
 * watched for the folder itself being removed and made again, which its own watch would not survive.
 */
export class FolderWatcher {
  private readonly folder: string;
  private readonly parent: FSWatcher;
  private handle: FolderHandle | undefined;
  /** Which folder the handle watches: number and birth, as one made anew may get the old number. */
  private watched: string | undefined;
  private readonly waiting = new Set<string>();
  /** The waiting files as they are. */
  private readonly seen = new Map<string, Sighting>();
  /** Size and time of each file when it was last delivered or refused. */
  private readonly done = new Map<string, string>();
  private timer: NodeJS.Timeout | undefined;
  private readonly relist: NodeJS.Timeout;
  private working = false;
  private listing = false;
  private askedAgain = false;
  private closed = false;

  constructor(
    folder: string,
    private readonly poll: boolean,
    private readonly handlers: WatchHandlers,
  ) {
    this.folder = resolve(folder);
    this.parent = watchParent(dirname(this.folder), {
      depth: 0,
      ignoreInitial: true,
      usePolling: poll,
      interval: POLL_MS,
      ignored: path => path !== dirname(this.folder) && path !== this.folder,
    });
    this.parent.on('addDir', path => path === this.folder && void this.list());
    this.parent.on('unlinkDir', path => path === this.folder && this.gone());
    // A parent that cannot be watched costs only the notice of the folder's return: the list finds it.
    this.parent.on('error', () => {});
    this.relist = setInterval(() => void this.list(), poll ? POLL_MS : RELIST_MS);
    void this.list();
  }

  /** Lists the folder now instead of waiting for the next time. */
  look(): void {
    void this.list();
  }

  async close(): Promise<void> {
    this.closed = true;
    clearInterval(this.relist);
    clearTimeout(this.timer);
    this.detach();
    await this.parent.close();
  }

  /** Watches the folder that stands there now. */
  private attach(folder: string): void {
    if (this.poll || this.watched === folder) return;
    this.detach();
    try {
      this.handle = watchFolder(this.folder, (_, name) => name !== null && this.notice(name));
      this.handle.on('error', () => this.detach());
      this.watched = folder;
    } catch {
      // Gone again, or no watches left: the list goes on.
    }
  }

  private detach(): void {
    this.handle?.close();
    this.handle = undefined;
    this.watched = undefined;
  }

  private gone(): void {
    this.detach();
    this.handlers.onFolder(false);
  }

  private notice(name: string): void {
    if (UNFINISHED.test(name) || this.closed) return;
    this.waiting.add(name);
    this.schedule(SETTLE_MS);
  }

  /** Lists the folder and notices every file that is new or has changed, oldest first. */
  private async list(): Promise<void> {
    if (this.closed) return;
    // A disk that answers slowly is not asked again before it has.
    this.askedAgain = this.listing;
    if (this.listing) return;
    this.listing = true;
    const fresh = await this.freshFiles().catch(() => undefined);
    this.listing = false;
    if (this.closed) return;
    if (this.askedAgain) void this.list();
    if (fresh === undefined) {
      this.gone();
      return;
    }
    this.handlers.onFolder(true);
    for (const name of fresh) this.notice(name);
    if (fresh.length === 0 && this.waiting.size === 0 && !this.working) this.handlers.onIdle();
  }

  /** Names of files that are new or have changed, oldest first. Throws when the folder is not there. */
  private async freshFiles(): Promise<readonly string[]> {
    // Watched before it is listed: what comes in between is noticed.
    const { ino, birthtimeMs } = await stat(this.folder);
    if (!this.closed) this.attach(`${ino} ${birthtimeMs}`);
    const fresh: { readonly name: string; readonly time: number }[] = [];
    for (const name of await readdir(this.folder)) {
      if (UNFINISHED.test(name)) continue;
      const status = await lstat(join(this.folder, name)).catch(() => undefined);
      if (status === undefined || status.isDirectory()) continue;
      if (this.done.get(name) !== keyOf(status.size, status.mtimeMs))
        fresh.push({ name, time: status.mtimeMs });
    }
    fresh.sort((a, b) => a.time - b.time || (a.name < b.name ? -1 : 1));
    return fresh.map(({ name }) => name);
  }

  private schedule(delay_ms: number): void {
    if (this.timer !== undefined || this.working || this.closed) return;
    this.timer = setTimeout(() => {
      this.timer = undefined;
      void this.work();
    }, delay_ms);
  }

  private async work(): Promise<void> {
    this.working = true;
    for (const name of [...this.waiting]) {
      if (this.closed) return;
      // Taken off first: a change that comes while the file is read puts it back.
      this.waiting.delete(name);
      if (await this.tryFile(name)) this.seen.delete(name);
      else this.waiting.add(name);
    }
    this.working = false;
    if (this.waiting.size > 0) this.schedule(RECHECK_MS);
    else this.handlers.onIdle();
  }

  /** True when nothing more is to be done about the file for now. */
  private async tryFile(name: string): Promise<boolean> {
    const path = join(this.folder, basename(name));
    const seen = await glance(path);
    if (seen === undefined) {
      this.done.delete(name);
      return true;
    }
    if (isRefusal(seen)) return this.refuse(name, seen, seen.code);
    const key = keyOf(seen.bytes, seen.modified_ms);
    if (this.done.get(name) === key) return true;
    const sighting = this.sightingOf(name, key);
    const seen_ms = performance.now() - sighting.since_ms;
    const still = { byFileTime_ms: Date.now() - seen.modified_ms, seen_ms };
    if (!isComplete(seen, still) && !(await this.isWhole(path, seen, sighting))) return false;
    const bytes = await readWhole(path);
    if (bytes === undefined) return true;
    if (isRefusal(bytes)) return this.refuse(name, bytes, key);
    this.done.set(name, key);
    await this.handlers.onFile(name, bytes);
    return true;
  }

  /** The file as it is now, and since when, by a clock that nobody sets. */
  private sightingOf(name: string, key: string): Sighting {
    const known = this.seen.get(name);
    if (known?.key === key) return known;
    const ending = known === undefined ? 'not-looked-for' : 'still-growing';
    const sighting: Sighting = { key, since_ms: performance.now(), ending };
    this.seen.set(name, sighting);
    return sighting;
  }

  /**
   * Looks into a file at first sight, and then once each time it has stopped growing: unpacking a large one again and
   * again while it comes would hold up the others.
   */
  private async isWhole(path: string, seen: Glance, sighting: Sighting): Promise<boolean> {
    const { ending } = sighting;
    sighting.ending = ending === 'still-growing' ? 'not-looked-for' : 'not-reached';
    if (ending !== 'not-looked-for') return false;
    return await reachesItsEnd(path, seen);
  }

  private refuse(name: string, refusal: Refusal, key: string): true {
    if (this.done.get(name) !== key) this.handlers.onRefused(name, refusal);
    this.done.set(name, key);
    return true;
  }
}

function keyOf(bytes: number, modified_ms: number): string {
  return `${bytes} ${modified_ms}`;
}
