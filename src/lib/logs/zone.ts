const HOUR_MS = 3600_000;
const SEARCH_MS = 40 * 24 * HOUR_MS;

/** Offsets of one IANA zone from UTC, kept for the stretch around the last question, so that asking row by row is cheap. */
export class ZoneOffsets {
  private readonly format: Intl.DateTimeFormat;
  private fromMs = Infinity;
  private toMs = -Infinity;
  private offsetMs = 0;

  constructor(readonly zone: string) {
    this.format = new Intl.DateTimeFormat('en-US', {
      timeZone: zone,
      hourCycle: 'h23',
      year: 'numeric',
      month: 'numeric',
      day: 'numeric',
      hour: 'numeric',
      minute: 'numeric',
      second: 'numeric',
      era: 'short',
    });
  }

  /** Milliseconds by which local time is ahead of UTC at an instant. */
  at(utcMs: number): number {
    if (utcMs >= this.fromMs && utcMs < this.toMs) return this.offsetMs;
    this.offsetMs = this.compute(utcMs);
    this.fromMs = this.edge(utcMs, -1);
    this.toMs = this.edge(utcMs, 1);
    return this.offsetMs;
  }

  /** Whether local times within a day and a half of this one all have one and the same offset; if so it is `at` it. */
  steadyAround(localMs: number): boolean {
    return localMs - 36 * HOUR_MS >= this.fromMs && localMs + 36 * HOUR_MS < this.toMs;
  }

  /** The offsets under which a local time exists: one, two in the hour that comes twice, none in the hour that is skipped. */
  offsetsOf(localMs: number): number[] {
    const before = this.at(localMs - 26 * HOUR_MS);
    const after = this.at(localMs + 26 * HOUR_MS);
    const candidates = before === after ? [before] : [before, after];
    return candidates.filter((offset) => this.at(localMs - offset) === offset);
  }

  /** The offset before the change that is nearest to a local time. */
  offsetBefore(localMs: number): number {
    return this.at(localMs - 26 * HOUR_MS);
  }

  private compute(utcMs: number): number {
    const parts: Record<string, string> = {};
    for (const part of this.format.formatToParts(new Date(utcMs))) parts[part.type] = part.value;
    const year = Number(parts['year']) * (parts['era'] === 'BC' ? -1 : 1);
    const asUtc = Date.UTC(
      year,
      Number(parts['month']) - 1,
      Number(parts['day']),
      Number(parts['hour']),
      Number(parts['minute']),
      Number(parts['second']),
    );
    return asUtc - Math.floor(utcMs / 1000) * 1000;
  }

  /** The nearest change of offset before (excluded) or after (included) an instant, at most 40 days away, to the second. */
  private edge(utcMs: number, direction: -1 | 1): number {
    let near = utcMs;
    let far = utcMs;
    for (let reach = 12 * HOUR_MS; reach <= SEARCH_MS; reach *= 2) {
      far = utcMs + direction * Math.min(reach, SEARCH_MS);
      if (this.compute(far) !== this.offsetMs) break;
      near = far;
    }
    if (near === far) return far;
    while (Math.abs(far - near) > 1000) {
      const middle = Math.floor((near + far) / 2000) * 1000;
      if (middle === near || middle === far) break;
      if (this.compute(middle) === this.offsetMs) near = middle;
      else far = middle;
    }
    return direction === 1 ? far : near;
  }
}

/**
 * Local wall-clock times, in the order of the file, to instants. In the hour that comes twice a step backwards begins its second
 * pass. A logger that does not follow the change (it logs through the hour that is skipped, or passes the doubled hour only
 * once without a break) keeps the offset it had.
 */
export class LocalClock {
  private previousLocalMs = NaN;
  private previousOffsetMs = NaN;
  private stuckOffsetMs: number | null = null;
  private typicalStepMs = 60_000;

  /** `nearMs`: where two readings are possible for the very first time, the one nearer to this instant is taken. */
  constructor(
    private readonly offsets: ZoneOffsets,
    private readonly nearMs: number | null,
  ) {}

  setTypicalStep(stepMs: number): void {
    if (stepMs > 0) this.typicalStepMs = stepMs;
  }

  toUtcMs(localMs: number): number {
    const offsetMs = this.stuckOffsetMs ?? this.choose(localMs);
    this.previousLocalMs = localMs;
    this.previousOffsetMs = offsetMs;
    return localMs - offsetMs;
  }

  private choose(localMs: number): number {
    if (this.offsets.steadyAround(localMs)) return this.offsets.at(localMs);
    const possible = this.offsets.offsetsOf(localMs);
    if (Number.isNaN(this.previousLocalMs)) return this.chooseFirst(localMs, possible);
    const stepMs = localMs - this.previousLocalMs;
    const smooth = stepMs >= 0 && stepMs <= Math.max(120_000, 5 * this.typicalStepMs);
    if (possible.length === 0) {
      const kept = smooth ? this.previousOffsetMs : this.offsets.offsetBefore(localMs);
      if (smooth) this.stuckOffsetMs = kept;
      return kept;
    }
    if (possible.length === 1) {
      const only = possible[0] ?? 0;
      if (only === this.previousOffsetMs || !smooth) return only;
      // the offset changed without the wall clock having jumped: this logger's clock does not follow the change
      this.stuckOffsetMs = this.previousOffsetMs;
      return this.previousOffsetMs;
    }
    if (stepMs < 0 && stepMs > -2 * 3600_000) return Math.min(...possible);
    return possible.includes(this.previousOffsetMs) ? this.previousOffsetMs : Math.max(...possible);
  }

  private chooseFirst(localMs: number, possible: number[]): number {
    if (possible.length === 0) return this.offsets.offsetBefore(localMs);
    const nearMs = this.nearMs;
    if (nearMs === null) return Math.max(...possible);
    const distance = (offset: number): number => Math.abs(localMs - offset - nearMs);
    return possible.reduce((best, offset) => (distance(offset) < distance(best) ? offset : best));
  }
}
