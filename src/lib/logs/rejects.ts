const MOST_LISTED = 1000;

/** Rows that were not taken: the first 1,000 in full, all of them counted. */
export class Rejects {
  count = 0;
  private listed: { line: number; reason: string }[] = [];

  add(line: number, reason: string): void {
    this.count++;
    if (this.listed.length < MOST_LISTED) this.listed.push({ line, reason });
    else this.keepLower(line, reason);
  }

  /** Duplicates are found a little late: a lower line takes the place of the highest listed. */
  private keepLower(line: number, reason: string): void {
    let highest = 0;
    for (let i = 1; i < this.listed.length; i++) {
      if ((this.listed[i]?.line ?? 0) > (this.listed[highest]?.line ?? 0)) highest = i;
    }
    if (line < (this.listed[highest]?.line ?? 0)) this.listed[highest] = { line, reason };
  }

  list(): { line: number; reason: string }[] {
    return [...this.listed].sort((a, b) => a.line - b.line);
  }
}
