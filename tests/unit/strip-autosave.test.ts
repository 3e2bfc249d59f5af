import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { Autosave, SaveRejection } from '~/components/islands/profile-strip/autosave';

/** A server that answers when the test says so. */
function serverAnswering() {
  const sent: string[] = [];
  const answers: { keep: () => void; refuse: (error: unknown) => void }[] = [];
  const save = (document: string): Promise<void> => {
    sent.push(document);
    return new Promise((resolve, reject) => answers.push({ keep: resolve, refuse: reject }));
  };
  return { sent, answers, save };
}

const isSame = (a: string, b: string) => a === b;
const away = () => new SaveRejection({ kind: 'away', message: 'no connection' });

describe('a draft is kept as it is changed', () => {
  beforeEach(() => {
    vi.useFakeTimers({ now: 1_000_000 });
  });
  afterEach(() => {
    vi.useRealTimers();
  });

  const begin = () => {
    const server = serverAnswering();
    const autosave = new Autosave<string>('first', { save: server.save, isSame, now: Date.now, restMs: 800 });
    return { server, autosave };
  };

  it('sends the last of several changes once the hand rests, and says when it was kept', async () => {
    const { server, autosave } = begin();
    autosave.changed('a');
    await vi.advanceTimersByTimeAsync(500);
    autosave.changed('b');
    await vi.advanceTimersByTimeAsync(500);
    expect(server.sent).toEqual([]);
    await vi.advanceTimersByTimeAsync(400);
    expect(server.sent).toEqual(['b']);
    expect(autosave.snapshot().kind).toBe('saving');
    server.answers[0]?.keep();
    await vi.advanceTimersByTimeAsync(0);
    expect(autosave.snapshot()).toEqual({ kind: 'saved', atMs: Date.now() });
    expect(autosave.isUnsaved).toBe(false);
  });

  it('never has two calls under way, and sends what was changed meanwhile after the first is answered', async () => {
    const { server, autosave } = begin();
    autosave.changed('a');
    await vi.advanceTimersByTimeAsync(900);
    autosave.changed('b');
    await vi.advanceTimersByTimeAsync(5_000);
    expect(server.sent).toEqual(['a']);
    server.answers[0]?.keep();
    await vi.advanceTimersByTimeAsync(900);
    expect(server.sent).toEqual(['a', 'b']);
    expect(autosave.isUnsaved).toBe(true);
  });

  it('asks again with growing rests while the server is away, and loses nothing', async () => {
    const { server, autosave } = begin();
    autosave.changed('a');
    await vi.advanceTimersByTimeAsync(800);
    const restsS: number[] = [];
    for (let turn = 0; turn < 7; turn += 1) {
      server.answers[turn]?.refuse(away());
      await vi.advanceTimersByTimeAsync(0);
      const state = autosave.snapshot();
      if (state.kind !== 'away') throw new Error(`it is ${state.kind}`);
      restsS.push((state.retryAtMs - Date.now()) / 1000);
      autosave.changed(`a${turn}`);
      await vi.advanceTimersByTimeAsync(state.retryAtMs - Date.now());
    }
    expect(restsS).toEqual([2, 4, 8, 16, 32, 60, 60]);
    expect(server.sent[server.sent.length - 1]).toBe('a6');
    expect(autosave.isUnsaved).toBe(true);
  });

  it('does not ask again when it was refused, until the document is another', async () => {
    const { server, autosave } = begin();
    autosave.changed('bad');
    await vi.advanceTimersByTimeAsync(800);
    server.answers[0]?.refuse(new SaveRejection({ kind: 'refused', message: 'not valid' }));
    await vi.advanceTimersByTimeAsync(600_000);
    expect(server.sent).toEqual(['bad']);
    autosave.changed('good');
    await vi.advanceTimersByTimeAsync(800);
    expect(server.sent).toEqual(['bad', 'good']);
  });

  it('sends nothing after a conflict until a person has chosen, and then what was chosen', async () => {
    const { server, autosave } = begin();
    autosave.changed('mine');
    await vi.advanceTimersByTimeAsync(800);
    server.answers[0]?.refuse(new SaveRejection({ kind: 'conflict', theirs: 'theirs' }));
    await vi.advanceTimersByTimeAsync(0);
    autosave.changed('mine, longer');
    await vi.advanceTimersByTimeAsync(600_000);
    expect(autosave.snapshot()).toEqual({ kind: 'conflict', theirs: 'theirs' });
    expect(server.sent).toEqual(['mine']);
    autosave.settle('theirs', 'mine, longer');
    await vi.advanceTimersByTimeAsync(0);
    expect(server.sent).toEqual(['mine', 'mine, longer']);
  });

  it('has nothing to send once a change was undone', async () => {
    const { server, autosave } = begin();
    autosave.changed('a');
    autosave.changed('first');
    await vi.advanceTimersByTimeAsync(5_000);
    expect(server.sent).toEqual([]);
    expect(autosave.snapshot().kind).toBe('saved');
  });

  it('tells its listeners of every state, and none that has left', async () => {
    const { server, autosave } = begin();
    const states: string[] = [];
    const leave = autosave.subscribe(() => states.push(autosave.snapshot().kind));
    autosave.changed('a');
    await vi.advanceTimersByTimeAsync(800);
    leave();
    server.answers[0]?.keep();
    await vi.advanceTimersByTimeAsync(0);
    expect(states).toEqual(['waiting', 'saving']);
  });
});
