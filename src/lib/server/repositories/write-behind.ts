/**
 * Lets one write be under way while its writer makes the next. A write that failed is reported by the next call, or by
 * `done`, which has to be awaited before the transaction ends.
 */
export class WriteBehind {
  #under: Promise<unknown> = Promise.resolve();

  async write(work: () => Promise<unknown>): Promise<void> {
    await this.#under;
    this.#under = work();
    // Reported by the next await; without this a failure in between would end the process.
    this.#under.catch(() => undefined);
  }

  async done(): Promise<void> {
    await this.#under;
  }

  /** Waits for what is under way, whatever comes of it: before a transaction is rolled back. */
  async settled(): Promise<void> {
    await this.#under.catch(() => undefined);
  }
}
