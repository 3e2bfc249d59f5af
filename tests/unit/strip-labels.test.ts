import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  availableLayers,
  FIRST_SHOWN,
  hatchesOf,
  LAYERS,
  layersOf,
} from '~/components/islands/profile-strip/layers-shown';
import { placeNotes } from '~/components/islands/profile-strip/notes';
import { placeBrackets, takenBy } from '~/components/islands/strip/Bracket';
import { curveRects, placeWords, type Rect } from '~/components/islands/strip/label-places';
import { stripScales } from '~/components/islands/strip/scales';
import { plannedCurve } from '~/lib/profile/planned';
import { profileSchema } from '~/lib/profile/schema';
import type { Estimate } from '~/lib/thermal/estimate-schema';

const box = { leftPx: 68, topPx: 30, widthPx: 1146, heightPx: 370 };
const bounds = { x: 0, y: 0, width: 1000, height: 400 };
const rect = fc.record({
  x: fc.integer({ min: -50, max: 1000 }),
  y: fc.integer({ min: -50, max: 400 }),
  width: fc.integer({ min: 10, max: 200 }),
  height: fc.constant(15),
});
const meet = (a: Rect, b: Rect): boolean =>
  a.x < b.x + b.width && b.x < a.x + a.width && a.y < b.y + b.height && b.y < a.y + a.height;

/** A wax shell put straight into a hot kiln: all that has a name happens in the first of 35 hours. */
const profile = profileSchema.parse({
  startC: 20,
  segments: [
    { stage: 'melt-out', toC: 720, rateCPerH: 700, holdS: 2700 },
    { stage: 'vitrification', toC: 900, rateCPerH: 240, holdS: 3600 },
    { stage: 'cooling', toC: 200, rateCPerH: 23, holdS: 0 },
  ],
});
const planned = plannedCurve(profile, [null, null, null]);
const estimate = {
  mould: 0,
  predictedS: 120_000,
  segments: [],
  curve: {
    timeS: [0, 600, 1_200, 9_000, 15_000, 120_000],
    chamberC: [20, 300, 670, 850, 900, 200],
    mouldCoreC: [20, 60, 420, 830, 900, 200],
    patternLeftShare: [1, 0.6, 0, 0, 0, 0],
    waterLeftKg: [0.05, 0.01, 0, 0, 0, 0],
    gasGPerMin: [0, 59, 0, 0, 0, 0],
    powerKW: [30, 30, 24, 22, 0, 0],
    heatWorkH: [0, 0, 0, 0.5, 2.5, 2.5],
  },
} as unknown as Estimate;
const scales = stripScales('across', { fromS: 0, toS: 126_000, minC: 0, maxC: 1000 }, box);
const every = new Set(LAYERS.map(({ id }) => id));

describe('words on the strip', () => {
  it('stay within the paper, and stand free wherever one of the places wished for is free', () => {
    fc.assert(
      fc.property(
        fc.array(rect, { minLength: 1, maxLength: 8 }),
        fc.array(rect, { maxLength: 12 }),
        (wished, taken) => {
          const place = placeWords(wished, taken, bounds);
          expect(place.x).toBeGreaterThanOrEqual(0);
          expect(place.y).toBeGreaterThanOrEqual(0);
          expect(place.x + place.width).toBeLessThanOrEqual(bounds.width);
          expect(place.y + place.height).toBeLessThanOrEqual(bounds.height);
          const alone = wished.map((one) => placeWords([one], [], bounds));
          const isSomeFree = alone.some((one) => !taken.some((other) => meet(one, other)));
          if (isSomeFree) expect(taken.filter((other) => meet(place, other))).toEqual([]);
        },
      ),
    );
  });

  it('of a bracket keep clear of the edge of the paper and of other brackets', () => {
    const at = (fromS: number, aboveC: number) => ({
      fromS,
      toS: fromS + 2000,
      aboveC,
      text: 'kiln 36 min behind',
    });
    const brackets = placeBrackets(scales, [at(1000, 990), at(4000, 985), at(9000, 980)]);
    for (const { words } of brackets) expect(words.y).toBeGreaterThan(box.topPx + 3);
    brackets.forEach((one, index) => {
      for (const other of brackets.slice(index + 1))
        expect(takenBy(other).filter((part) => meet(one.words, part))).toEqual([]);
    });
  });

  it('cover neither a curve nor each other where all happens at the left edge', () => {
    for (const shown of [new Set(FIRST_SHOWN), every]) {
      const layers = layersOf(planned, estimate, shown);
      const notes = placeNotes({ scales, planned, estimate, shown, layers, scale: 'C' }, []);
      expect(notes.map(({ text }) => text)).toContain('pattern left');
      expect(notes.some(({ text }) => text.startsWith('mould core, '))).toBe(true);
      notes.forEach((note, index) => {
        for (const other of notes.slice(index + 1)) expect(meet(note.place, other.place)).toBe(false);
      });
      const curves = curveRects(scales, layers);
      const covering = notes.filter(({ place }) => curves.some((part) => meet(place, part)));
      expect(covering.map(({ text }) => text)).toEqual([]);
    }
  });
});

describe('layers of the strip', () => {
  it('are there for each that the estimate has something to show for, the first mould of a load too', () => {
    expect([...availableLayers(planned, estimate)]).toEqual(LAYERS.map(({ id }) => id));
    expect([...availableLayers(planned, null)]).toEqual(['plan']);
    const empty = {
      ...estimate,
      mould: null,
      curve: { ...estimate.curve, patternLeftShare: [0, 0, 0, 0, 0, 0] },
    };
    const there = availableLayers(planned, empty);
    for (const id of ['core', 'pattern', 'heat-work'] as const) expect(there.has(id)).toBe(false);
  });

  it('are drawn when they are switched on, each once, and the plan alone without an estimate', () => {
    for (const { id } of LAYERS) {
      const shown = new Set([id]);
      const drawn = [...layersOf(planned, estimate, shown), ...hatchesOf(estimate, shown)];
      expect(drawn.map((layer) => layer.id)).toEqual([id]);
    }
    expect(layersOf(planned, null, new Set()).map(({ id }) => id)).toEqual(['plan']);
  });

  it('at the foot are shares of their highest value, and say what that is', () => {
    const [power] = layersOf(planned, estimate, new Set(['power'] as const));
    expect(power?.full).toEqual({ value: 30, unit: 'kW', digits: 1 });
    expect(Math.max(...Array.from(power?.value ?? [], Number))).toBe(1);
  });
});
