import { describe, expect, it } from 'vitest';
import { headAndRest } from '~/components/islands/profile-strip/Cautions';
import { mouldsText, patternsText } from '~/components/islands/profile-strip/describe';
import {
  beginEditing,
  editing,
  kilnRampsOf,
  type ProfileDocument,
} from '~/components/islands/profile-strip/document';
import { differencesOf } from '~/components/islands/profile-strip/differences';
import { lateSegments, largestLag } from '~/components/islands/profile-strip/lateness';
import { figureText, parseFigure, parsePercent } from '~/components/islands/profile-strip/parse-amounts';
import { permissionsFor } from '~/components/islands/profile-strip/permissions';
import { parseRamp } from '~/components/islands/profile-strip/shown';
import { parseTarget } from '~/components/islands/profile-strip/SegmentFields';
import { setSegment } from '~/lib/profile/edit';
import { plannedCurve } from '~/lib/profile/planned';
import { profileSchema } from '~/lib/profile/schema';
import type { Estimate } from '~/lib/thermal/estimate-schema';
import { loadSchema } from '~/lib/thermal/load-schema';
import { METRIC } from '~/lib/units';

const profile = profileSchema.parse({
  startC: 20,
  segments: [
    { stage: 'drying', toC: 95, rateCPerH: 50, holdS: 3600 },
    { stage: 'burnout', toC: 650, rateCPerH: 185, holdS: 5400 },
    { stage: 'cooling', toC: 100, rateCPerH: 'coast', holdS: 0 },
  ],
});
const document: ProfileDocument = { name: 'Shell', kilnId: null, profile, load: null };
const retargeted = (toC: number): ProfileDocument => ({
  ...document,
  profile: setSegment(profile, 1, { toC }),
});

describe('editing a profile', () => {
  it('remembers what stood before the last change, and a drag is one change', () => {
    let state = beginEditing(document);
    for (const toC of [655, 660, 665])
      state = editing(state, { do: 'edit', to: retargeted(toC), key: '1.drag' });
    expect(state.before).toBe(document);
    state = editing(state, { do: 'end-step' });
    const dropped = state.history.present;
    state = editing(state, { do: 'edit', to: retargeted(700), key: '1.drag' });
    expect(state.before).toBe(dropped);
    state = editing(state, { do: 'undo' });
    expect(state.history.present).toBe(dropped);
    state = editing(state, { do: 'undo' });
    expect(state.history.present).toBe(document);
    expect(state.before).toBe(dropped);
    expect(editing(state, { do: 'redo' }).history.present).toBe(dropped);
  });

  it('takes no step for a change that changes nothing', () => {
    const state = beginEditing(document);
    expect(editing(state, { do: 'edit', to: retargeted(650) })).toBe(state);
  });

  it('keeps the selection on a segment that is there', () => {
    const state = editing(beginEditing(document), { do: 'select', segment: 2 });
    const shorter = { ...document, profile: { ...profile, segments: profile.segments.slice(0, 2) } };
    expect(editing(state, { do: 'edit', to: shorter }).selected).toBe(1);
  });
});

describe('a ramp as it is typed', () => {
  it('is a rate, a time where it carries one, or a word', () => {
    expect(parseRamp('120', 'rate', 'C')).toEqual({ ok: true, value: { rate: 120 } });
    expect(parseRamp('1:30', 'rate', 'C')).toEqual({ ok: true, value: { rampS: 5400 } });
    expect(parseRamp('90 min', 'rate', 'C')).toEqual({ ok: true, value: { rampS: 5400 } });
    expect(parseRamp('90', 'time', 'C')).toEqual({ ok: true, value: { rampS: 5400 } });
    expect(parseRamp('120 °C/h', 'time', 'C')).toEqual({ ok: true, value: { rate: 120 } });
    expect(parseRamp('flat out', 'rate', 'C')).toEqual({ ok: true, value: { rate: 'flat-out' } });
    expect(parseRamp('coast', 'time', 'C')).toEqual({ ok: true, value: { rate: 'coast' } });
  });

  it('in °F is an interval: 216 °F/h is 120 °C/h', () => {
    const found = parseRamp('216', 'rate', 'F');
    expect(found.ok && 'rate' in found.value && found.value.rate).toBeCloseTo(120, 9);
  });

  it('outside what a profile takes is refused with its range', () => {
    expect(parseRamp('5000', 'rate', 'C')).toMatchObject({ ok: false });
    expect(parseRamp('0 min', 'time', 'C')).toMatchObject({ ok: false });
    expect(parseRamp('soon', 'rate', 'C')).toMatchObject({ ok: false });
  });

  it('a target above the limit of the kiln is refused and says which limit', () => {
    const found = parseTarget('2400 F', 'C', 1260);
    expect(found.ok ? '' : found.issue).toMatch(/1316.*kiln's limit.*1260/);
    const one = parseTarget('1500F', 'C', 1260);
    expect(one.ok && one.value).toBeCloseTo(815.556, 3);
  });
});

describe('figures of the materials table', () => {
  it('are written with four digits, and read as they are written', () => {
    for (const value of [0.0009, 2e-14, 1.68e7, 0.28, 870, 1085, -0.5]) {
      const read = parseFigure(figureText(value));
      expect(read.ok && Math.abs(read.value - value) / Math.abs(value)).toBeLessThan(1e-3);
    }
  });

  it('a share is typed in percent', () => {
    expect(parsePercent('60 %')).toEqual({ ok: true, value: 0.6 });
    expect(parsePercent('60')).toEqual({ ok: true, value: 0.6 });
    expect(parsePercent('120')).toMatchObject({ ok: false });
  });
});

describe('a load in words', () => {
  it('names number, wall and material, and what is burned out', () => {
    const load = loadSchema.parse({
      moulds: [
        {
          material: 'fused-silica-shell',
          count: 4,
          massKg: 1.2,
          wallM: 0.008,
          pattern: { material: 'pla', massKg: 0.0875 },
        },
      ],
    });
    expect(mouldsText(load, METRIC).replace(/\s/g, ' ')).toBe('4 shells, 8 mm fused silica');
    expect(patternsText(load, METRIC)?.replace(/\s/g, ' ')).toBe('350 g printed PLA');
    expect(mouldsText(null, METRIC)).toBe('an empty kiln');
    expect(patternsText(null, METRIC)).toBeNull();
  });
});

/** Only what these readings of an estimate look at; made up for the test. */
const estimate = (
  segments: Partial<Estimate['segments'][number]>[],
  curve: Partial<Estimate['curve']> = {},
) => ({ segments, curve, mould: 0, predictedS: 30_000 }) as unknown as Estimate;

describe('what the strip reads from an estimate', () => {
  it('takes the length of a coasting ramp from the kiln', () => {
    const timed = estimate([{}, {}, { plannedStartS: 20_000, plannedEndS: 29_000 }]);
    expect(kilnRampsOf(profile, timed)).toEqual([null, null, 9_000]);
    expect(plannedCurve(profile, kilnRampsOf(profile, timed)).legs[2]?.slopeFrom).toBe('kiln');
  });

  it('brackets the segment whose own ramp is late, not those that only start late', () => {
    const planned = plannedCurve(profile, [null, null, 9_000]);
    const [first, second] = planned.legs;
    if (!first || !second) throw new Error('two segments are expected');
    const late = lateSegments(
      planned,
      estimate([
        { rampEndS: first.rampEndS + 1_200, endS: first.endS + 1_200, kilnLimited: true },
        { rampEndS: second.rampEndS + 1_250, endS: second.endS + 1_250, kilnLimited: true },
      ]),
    );
    expect(late.map((segment) => [segment.index, segment.behindS])).toEqual([[0, 1_200]]);
  });

  it('finds where the mould core trails most', () => {
    const lag = largestLag(
      estimate([], { timeS: [0, 100, 200], chamberC: [20, 200, 300], mouldCoreC: [20, 120, 280] }),
    );
    expect(lag).toEqual({ atS: 100, coreC: 120, lagC: 80 });
  });

  it('sets the first sentence of a caution apart, and does not cut a decimal', () => {
    expect(headAndRest('It gives off 6.4 kW. The kiln has 6.0 kW.')).toEqual([
      'It gives off 6.4 kW.',
      ' The kiln has 6.0 kW.',
    ]);
    expect(headAndRest('One sentence only')).toEqual(['One sentence only', '']);
  });
});

describe('two versions of a draft, side by side', () => {
  it('lists what differs, field by field', () => {
    const theirs = {
      ...document,
      name: 'Shell, thin',
      profile: setSegment(profile, 1, { toC: 700, holdS: 7200 }),
    };
    const lines = differencesOf(document, theirs, [], METRIC).map((line) => [
      line.what,
      line.mine.replace(/\s/g, ' '),
      line.theirs.replace(/\s/g, ' '),
    ]);
    expect(lines).toEqual([
      ['Name', 'Shell', 'Shell, thin'],
      ['Segment 2, target', '650 °C', '700 °C'],
      ['Segment 2, hold', '1 h 30', '2 h 00'],
    ]);
  });
});

describe('what the editor offers to whom', () => {
  const author = '00000000-0000-4000-8000-000000000001';
  const other = '00000000-0000-4000-8000-000000000002';
  const may = (
    id: string,
    roles: ('owner' | 'technician' | 'teacher' | 'student')[],
    state: 'draft' | 'in-review' | 'approved',
  ) => permissionsFor({ id, roles }, { state, authorId: author }, author, false);

  it('an author edits and submits a draft, and does not approve it', () => {
    expect(may(author, ['technician'], 'draft')).toMatchObject({ edit: true, submit: true, review: false });
    expect(may(author, ['teacher'], 'in-review')).toMatchObject({ edit: false, review: false });
  });

  it('a teacher reviews what another wrote', () => {
    expect(may(other, ['teacher'], 'in-review')).toMatchObject({ edit: false, review: true });
    expect(may(other, ['teacher'], 'approved')).toMatchObject({ handOut: true, retire: true, edit: false });
  });

  it('a student changes nothing that is not their own, and hands nothing out', () => {
    expect(may(other, ['student'], 'draft')).toMatchObject({ edit: false, submit: false });
    expect(may(other, ['student'], 'approved')).toMatchObject({
      handOut: false,
      retire: false,
      newVersion: false,
    });
  });
});
