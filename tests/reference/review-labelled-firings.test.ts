import { describe, expect, it } from 'vitest';
import { profileSchema } from '~/lib/profile/schema';
import { review } from '~/lib/review/review';
import { labelledCases, readLabelledLog } from '../helpers/labelled-log';
import { likeness, matchFindings } from '../helpers/match-findings';

// Source: fixtures/logs/p*/SOURCE.md. Firings simulated apart from this project's code, each label checked on the noiseless
// series against its definition. Limits: what a label's span may differ by is in tests/helpers/match-findings.ts.

/** The band in which the simulated programmers wait, °C (fixtures/logs/p*\/truth.json, `controller`). */
const SIMULATED_WAIT_BAND_C = 18;

function reviewed(name: string) {
  const { truth, channels } = readLabelledLog(name);
  const firstMs = channels[0]?.timeMs[0] ?? 0;
  // A log in elapsed time carries no date: it is taken to begin when the run was planned to.
  const onClock = truth.runStart.zone !== 'any';
  const plannedStartMs = onClock ? firstMs + (truth.startOffsetS - truth.clockErrorS) * 1000 : firstMs;
  const result = review({
    profile: profileSchema.parse(truth.profile),
    waitBandC: truth.controller === 'wait' ? SIMULATED_WAIT_BAND_C : null,
    openAtC: 120,
    channels,
    controlChannelId: truth.controlChannel,
    clockEvents: [],
    plannedStartMs,
    alignment: { method: 'auto' },
    predicted: null,
    cooling: null,
  });
  return { truth, result, match: matchFindings(result.findings, truth.findings) };
}

describe('labelled firings', () => {
  const cases = labelledCases();

  it('are eleven, two of them clean', () => {
    expect(cases).toHaveLength(11);
    expect(cases.map((name) => readLabelledLog(name).truth.clean).filter(Boolean)).toHaveLength(2);
  });

  it.each(cases)('%s: what is labelled is found, once, and nothing else', (name) => {
    const { match } = reviewed(name);
    expect(match.missed).toEqual([]);
    expect(match.false).toEqual([]);
  });

  it.each(cases)('%s: the start is right to a minute, each segment to two', (name) => {
    const { truth, result } = reviewed(name);
    expect(Math.abs(result.alignment.startOffsetS - truth.startOffsetS)).toBeLessThanOrEqual(60);
    for (const segment of result.segments) {
      const real = truth.segments[segment.segment];
      expect(Math.abs(segment.startS - (real?.startS ?? Number.NaN))).toBeLessThanOrEqual(120);
      if (segment.endS !== null)
        expect(Math.abs(segment.endS - (real?.endS ?? Number.NaN))).toBeLessThanOrEqual(120);
    }
  });

  it.each(cases)('%s: extremes are within 1.5 °C, and each finding is in its segment', (name) => {
    const { truth, result, match } = reviewed(name);
    for (const [i, j] of match.right) {
      const finding = result.findings[i];
      const label = truth.findings[j];
      expect(finding?.segment).toBe(label?.segment);
      if (label?.peakC !== undefined) expect(Math.abs((finding?.peakC ?? 0) - label.peakC)).toBeLessThan(1.5);
    }
  });

  it.each(cases)('%s: a near miss is left alone', (name) => {
    const { truth, result } = reviewed(name);
    for (const miss of truth.nearMisses) {
      const asLabel = { ...miss, kind: miss.like };
      expect(result.findings.filter((finding) => likeness(finding, asLabel) > 0)).toEqual([]);
    }
  });
});
