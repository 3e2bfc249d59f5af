import { describe, expect, it } from 'vitest';
import {
  beginHistory,
  canRedo,
  canUndo,
  endStep,
  record,
  redo,
  undo,
  type History,
} from '~/lib/profile/history';

const steps = (history: History<number>, ...values: number[]) =>
  values.reduce((all, value) => record(all, value), history);

describe('undo and redo', () => {
  it('go back and forth through every edit', () => {
    let history = steps(beginHistory(0), 1, 2, 3);
    history = undo(undo(history));
    expect(history.present).toBe(1);
    history = redo(history);
    expect(history.present).toBe(2);
    history = redo(redo(history));
    expect(history.present).toBe(3);
    expect(canRedo(history)).toBe(false);
  });

  it('stop at the beginning', () => {
    const history = undo(undo(undo(steps(beginHistory(0), 1))));
    expect(history.present).toBe(0);
    expect(canUndo(history)).toBe(false);
  });

  it('have no limit', () => {
    let history = beginHistory(0);
    for (let value = 1; value <= 20000; value += 1) history = record(history, value);
    for (let value = 1; value <= 20000; value += 1) history = undo(history);
    expect(history.present).toBe(0);
    for (let value = 1; value <= 20000; value += 1) history = redo(history);
    expect(history.present).toBe(20000);
  });

  it('forget what was undone once something else is done', () => {
    const history = record(undo(steps(beginHistory(0), 1, 2)), 9);
    expect(canRedo(history)).toBe(false);
    expect(undo(history).present).toBe(1);
  });

  it('take a drag back as one step', () => {
    let history = record(beginHistory(0), 1);
    for (const value of [2, 3, 4]) history = record(history, value, 'drag segments.0.toC');
    expect(undo(history).present).toBe(1);
    history = record(endStep(history), 5, 'drag segments.0.toC');
    expect(undo(history).present).toBe(4);
    expect(undo(undo(history)).present).toBe(1);
  });

  it('do not count an edit that changed nothing', () => {
    const history = steps(beginHistory(0), 1);
    expect(record(history, 1)).toBe(history);
  });
});
