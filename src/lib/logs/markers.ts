import { markerCode } from './numbers';
import { VALUE_CODES } from './types';

const MOST_TEXTS = 20;
const LONGEST_TEXT = 60;

/** The texts that stood where a channel's number was expected, and how often. */
export class Markers {
  private readonly counts = new Map<string, { count: number; code: number }>();

  /** Counts a text and says which of VALUE_CODES it is. */
  add(text: string): number {
    const trimmed = text.trim();
    const known = this.counts.get(trimmed);
    if (known) {
      known.count++;
      return known.code;
    }
    const code = markerCode(trimmed);
    if (code === VALUE_CODES.empty) return code;
    const key = this.counts.size < MOST_TEXTS - 1 ? trimmed.slice(0, LONGEST_TEXT) : 'other texts';
    const entry = this.counts.get(key) ?? { count: 0, code };
    entry.count++;
    this.counts.set(key, entry);
    return code;
  }

  list(): { text: string; count: number; kind: 'open' | 'missing' }[] {
    return [...this.counts].map(([text, { count, code }]) => ({
      text,
      count,
      kind: code === VALUE_CODES.open ? 'open' : 'missing',
    }));
  }
}
