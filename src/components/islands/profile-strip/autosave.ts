/** Why a save did not go through, told apart by what helps. */
export type SaveFailure =
  | { readonly kind: 'away'; readonly message: string }
  | { readonly kind: 'refused'; readonly message: string }
  | { readonly kind: 'conflict'; readonly theirs: unknown };

export type SaveState =
  | { readonly kind: 'saved'; readonly atMs: number | null }
  | { readonly kind: 'waiting' }
  | { readonly kind: 'saving' }
  /** No answer: tried again by itself at `retryAtMs`. */
  | { readonly kind: 'away'; readonly message: string; readonly retryAtMs: number }
  /** The server said no; trying the same again would not help. */
  | { readonly kind: 'refused'; readonly message: string }
  /** Someone else saved first. Nothing is sent until a person decides. */
  | { readonly kind: 'conflict'; readonly theirs: unknown };

export interface AutosaveOptions<T> {
  /** Sends it; resolves when it is kept. Rejects with a {@link SaveRejection}. */
  readonly save: (document: T) => Promise<void>;
  readonly isSame: (a: T, b: T) => boolean;
  readonly now: () => number;
  /** Rest after the last change before it is sent. */
  readonly restMs?: number;
}

export class SaveRejection extends Error {
  override readonly name = 'SaveRejection';
  constructor(readonly failure: SaveFailure) {
    super(failure.kind);
  }
}

const FIRST_RETRY_MS = 2_000;
const LONGEST_RETRY_MS = 60_000;

/**
 * Saves a document as it is changed: one call at a time, the newest state last, tried again with growing rests while the
 * server is away, halted at a conflict or a refusal. The document itself is never touched.
 */
export class Autosave<T> {
  private state: SaveState = { kind: 'saved', atMs: null };
  private kept: T;
  private current: T;
  private timer: ReturnType<typeof setTimeout> | null = null;
  private failures = 0;
  private inFlight = false;
  private readonly listeners = new Set<() => void>();

  constructor(
    first: T,
    private readonly options: AutosaveOptions<T>,
  ) {
    this.kept = first;
    this.current = first;
  }

  readonly subscribe = (listener: () => void): (() => void) => {
    this.listeners.add(listener);
    return () => this.listeners.delete(listener);
  };

  readonly snapshot = (): SaveState => this.state;

  get isUnsaved(): boolean {
    return this.inFlight || !this.options.isSame(this.current, this.kept);
  }

  changed(document: T): void {
    if (document === this.current) return;
    this.current = document;
    if (this.state.kind === 'conflict' || this.inFlight) return;
    if (this.options.isSame(document, this.kept)) {
      this.stopTimer();
      if (this.state.kind !== 'saved') this.enter({ kind: 'saved', atMs: null });
      return;
    }
    if (this.state.kind !== 'away') {
      this.enter({ kind: 'waiting' });
      this.startTimer(this.options.restMs ?? 800);
    }
  }

  /** Sends now what is not kept yet. */
  async flush(): Promise<void> {
    this.stopTimer();
    if (this.inFlight || this.state.kind === 'conflict') return;
    if (this.options.isSame(this.current, this.kept)) return;
    const sent = this.current;
    this.inFlight = true;
    this.enter({ kind: 'saving' });
    try {
      await this.options.save(sent);
      this.kept = sent;
      this.failures = 0;
      this.inFlight = false;
      this.enter({ kind: 'saved', atMs: this.options.now() });
      if (!this.options.isSame(this.current, sent)) {
        this.enter({ kind: 'waiting' });
        this.startTimer(this.options.restMs ?? 800);
      }
    } catch (error) {
      this.inFlight = false;
      this.fail(error);
    }
  }

  /** A conflict or refusal was settled: what is now on the server, and what stands in the editor. */
  settle(kept: T, current: T): void {
    this.kept = kept;
    this.current = current;
    this.failures = 0;
    if (this.options.isSame(kept, current)) this.enter({ kind: 'saved', atMs: this.options.now() });
    else {
      this.enter({ kind: 'waiting' });
      this.startTimer(0);
    }
  }

  dispose(): void {
    this.stopTimer();
    this.listeners.clear();
  }

  private fail(error: unknown): void {
    const failure: SaveFailure =
      error instanceof SaveRejection
        ? error.failure
        : { kind: 'refused', message: 'Something went wrong in this page. Reload it and try again.' };
    if (failure.kind !== 'away') {
      this.enter(failure);
      return;
    }
    const restMs = Math.min(LONGEST_RETRY_MS, FIRST_RETRY_MS * 2 ** this.failures);
    this.failures += 1;
    this.enter({ kind: 'away', message: failure.message, retryAtMs: this.options.now() + restMs });
    this.startTimer(restMs);
  }

  private enter(state: SaveState): void {
    this.state = state;
    for (const listener of this.listeners) listener();
  }

  private startTimer(ms: number): void {
    this.stopTimer();
    this.timer = setTimeout(() => {
      this.timer = null;
      void this.flush();
    }, ms);
  }

  private stopTimer(): void {
    if (this.timer !== null) clearTimeout(this.timer);
    this.timer = null;
  }
}
