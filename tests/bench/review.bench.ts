/**
 * Reviewing 1,000,000 samples of one channel (eleven and a half days of a row a second), against 100,000 of the same kind:
 * the work is to be linear. Run: npx tsx tests/bench/review.bench.ts
 */
import { profileSchema } from '~/lib/profile/schema';
import { review } from '~/lib/review/review';
import type { ReviewChannel } from '~/lib/review/types';

const profile = profileSchema.parse({
  startC: 20,
  segments: [
    { stage: 'melt-out', toC: 260, rateCPerH: 60, holdS: 7200 },
    { stage: 'vitrification', toC: 900, rateCPerH: 120, holdS: 7200 },
  ],
});
const CORNERS = [
  [0, 20],
  [14_400, 260],
  [21_600, 260],
  [40_800, 900],
  [48_000, 900],
  [90_000, 60],
] as const;

function channelOf(samples: number): ReviewChannel {
  const timeMs = new Float64Array(samples);
  const value = new Float64Array(samples);
  let noise = 1;
  for (let i = 0; i < samples; i++) {
    noise = (noise * 16_807) % 2_147_483_647;
    const k = CORNERS.findIndex(([t]) => t > i);
    const [t1, v1] = CORNERS[k] ?? [i, 60];
    const [t0, v0] = CORNERS[k < 0 ? CORNERS.length - 1 : k - 1] ?? [0, 20];
    const plainC = t1 > t0 ? v0 + ((v1 - v0) * (i - t0)) / (t1 - t0) : v1;
    timeMs[i] = i * 1000;
    value[i] = Math.round((plainC + (noise % 1000) / 1000 - 0.5) * 10) / 10;
  }
  return { id: 'chamber', name: 'chamber', role: 'chamber', quantity: 'temperature', timeMs, value };
}

function medianMs(samples: number): number {
  const channels = [channelOf(samples)];
  const times = Array.from({ length: 7 }, () => {
    const start = process.hrtime.bigint();
    review({
      profile,
      waitBandC: 18,
      openAtC: 120,
      channels,
      controlChannelId: 'chamber',
      clockEvents: [],
      plannedStartMs: 0,
      alignment: { method: 'auto' },
      predicted: null,
      cooling: null,
    });
    return Number(process.hrtime.bigint() - start) / 1e6;
  });
  return times.sort((a, b) => a - b)[3] ?? Number.NaN;
}

const small = medianMs(100_000);
const large = medianMs(1_000_000);
console.log(`review of 100,000 samples    ${small.toFixed(0)} ms median`);
console.log(
  `review of 1,000,000 samples  ${large.toFixed(0)} ms median (${(large / small).toFixed(1)} × for 10 × the samples)`,
);
