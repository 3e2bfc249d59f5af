/** How a made log is written. */
export interface LogShape {
  readonly rows: number;
  /** Share of a second by which a row may come early or late. */
  readonly jitterShare: number;
}

const PIECE_CHARS = 65_536;
const START_MS = Date.UTC(2026, 1, 14, 7);
/** 16,807 modulo 2³¹ − 1: the "minimal standard" generator of Park and Miller (1988). */
const next = (state: number): number => (state * 16_807) % 2_147_483_647;

/** A kiln's log of a row a second, as its logger would write it: time, temperature, power; climbs, holds, with noise. In pieces. */
export function* kilnLog({ rows, jitterShare }: LogShape): Generator<string> {
  yield 'time,chamber C,power %\n';
  let state = 1;
  let lines = '';
  for (let i = 0; i < rows; i++) {
    state = next(state);
    const jitterMs = Math.round(((state % 2001) / 1000 - 1) * jitterShare * 1000);
    const tempC = 20 + 850 * Math.min(1, (i % 60_000) / 40_000) + (state % 100) / 100;
    const at = new Date(START_MS + i * 1000 + jitterMs).toISOString();
    const time = jitterShare > 0 ? at : `${at.slice(0, 19)}Z`;
    lines += `${time},${tempC.toFixed(1)},${state % 101}\n`;
    if (lines.length > PIECE_CHARS) {
      yield lines;
      lines = '';
    }
  }
  yield lines;
}

/** The same as bytes, as a file has it. */
export function* kilnLogBytes(shape: LogShape): Generator<Uint8Array> {
  const encoder = new TextEncoder();
  for (const text of kilnLog(shape)) yield encoder.encode(text);
}
