import { describe, expect, it } from 'vitest';
import { caseBytes, caseJson, localToUtcMs, logCases, readLog, reportOf } from '../helpers/logs-reading';

interface Truth {
  rows: number;
  sampling: { intervalS: number; unit: string };
  runStart: { local: string; zone: string };
  startOffsetS: number;
  clockErrorS: number;
  controlChannel: string;
  channels: { name: string; role: string; unit: string | null }[];
}

const ZONE = 'Europe/London';
/** The labels' roles by ours: they tell the flask and the mould alike, and call a second chamber sensor so. */
const ROLES: Record<string, string[]> = {
  chamber: ['chamber'],
  second: ['chamber'],
  load: ['load', 'mould'],
  room: ['room'],
  power: ['other'],
};

describe('labelled firings', () => {
  it.each(logCases('truth.json'))(
    '%s: every row, its channels, its control channel and its beginning',
    (name) => {
      const truth = caseJson(name, 'truth.json') as Truth;
      const plannedStartMs =
        truth.runStart.zone === 'studio'
          ? localToUtcMs(truth.runStart.local, ZONE)
          : Date.parse(`${truth.runStart.local}Z`) - (Number(truth.runStart.zone) || 0) * 60_000;
      const { reading } = readLog(caseBytes(name, 'log.csv'), { studioTimeZone: ZONE, plannedStartMs });
      const report = reportOf(reading);
      expect([report.rows, report.acceptedRows, report.rejected]).toEqual([truth.rows, truth.rows, []]);
      const numeric = truth.channels.filter(({ role }) => role !== 'text');
      expect(report.channels.map(({ name: channel }) => channel)).toEqual(
        numeric.map(({ name: channel }) => channel),
      );
      report.channels.forEach((channel, i) => {
        expect(channel.unit).toBe(numeric[i]?.unit);
        expect(ROLES[numeric[i]?.role ?? '']).toContain(channel.role);
        expect(channel.samples + channel.missing).toBe(truth.rows);
      });
      expect(report.channels[report.controlChannel ?? -1]?.name).toBe(truth.controlChannel);
      expect(Math.abs((report.intervalS ?? NaN) - truth.sampling.intervalS)).toBeLessThan(
        0.2 * truth.sampling.intervalS,
      );
      if (truth.runStart.zone !== 'any') {
        const firstMs = Date.parse(report.firstAt ?? '');
        const expectedMs = plannedStartMs - (truth.startOffsetS - truth.clockErrorS) * 1000;
        expect(Math.abs(firstMs - expectedMs)).toBeLessThanOrEqual(1000 * truth.sampling.intervalS);
      }
      // a clock that was set forward is the review's to find; none of these was set back
      expect(report.clockEvents).toEqual([]);
    },
  );
});
