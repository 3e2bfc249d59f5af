const HOUR_MS = 3600_000;
const SEARCH_MS = 40 * 24 * HOUR_MS;

const MOST_STRETCHES = 8;

/** A time over which a zone's offset stays the same. */
interface Stretch {
  fromMs: number;
  toMs: number;
  offsetMs: number;
}

/** Offsets of one IANA zone from UTC, kept for the stretches asked about, so that asking row by row is cheap. */
export class ZoneOffsets {
  private readonly format: Intl.DateTimeFormat;
  private stretches: Stretch[] = [];
  private last: Stretch = { fromMs: Infinity, toMs: -Infinity, offsetMs: 0 };

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
    return this.stretchAt(utcMs).offsetMs;
  }

  /** The offset of all local times within a day and a half of this one, or NaN where it changes within them. */
  steadyAround(localMs: number): number {
    const { fromMs, toMs, offsetMs } = this.stretchAt(localMs);
    return localMs - 36 * HOUR_MS >= fromMs && localMs + 36 * HOUR_MS < toMs ? offsetMs : NaN;
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

  private stretchAt(utcMs: number): Stretch {
    if (utcMs >= this.last.fromMs && utcMs < this.last.toMs) return this.last;
    let found = this.stretches.find(({ fromMs, toMs }) => utcMs >= fromMs && utcMs < toMs);
    if (!found) {
      const offsetMs = this.compute(utcMs);
      found = { fromMs: this.edge(utcMs, -1, offsetMs), toMs: this.edge(utcMs, 1, offsetMs), offsetMs };
      this.stretches = [found, ...this.stretches.slice(0, MOST_STRETCHES - 1)];
    }
    this.last = found;
    return found;
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
  private edge(utcMs: number, direction: -1 | 1, offsetMs: number): number {
    let near = utcMs;
    let far = utcMs;
    for (let reach = 12 * HOUR_MS; reach <= SEARCH_MS; reach *= 2) {
      far = utcMs + direction * Math.min(reach, SEARCH_MS);
      if (this.compute(far) !== offsetMs) break;
      near = far;
    }
    if (near === far) return far;
    while (Math.abs(far - near) > 1000) {
      const middle = Math.floor((near + far) / 2000) * 1000;
      if (middle === near || middle === far) break;
      if (this.compute(middle) === offsetMs) near = middle;
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
    const steady = this.offsets.steadyAround(localMs);
    if (!Number.isNaN(steady)) return steady;
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
      const followedMs = stepMs - (only - this.previousOffsetMs);
      const off = (ms: number): number => Math.abs(ms - this.typicalStepMs);
      if (followedMs >= 0 && off(followedMs) <= off(stepMs)) return only;
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
