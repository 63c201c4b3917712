/** Looks for work whenever asked to, never twice at a time: asked while it looks, it looks once more afterwards, so that
 *  nothing which changed meanwhile is missed. */
export class LookAgain {
  private looking: Promise<void> | null = null;
  private isWanted = false;
  private isClosed = false;

  /** @param failed Told of an error while it is not closed; the next look comes by itself. */
  constructor(
    private readonly once: () => Promise<void>,
    private readonly failed: (error: unknown) => void,
  ) {}

  look(): void {
    this.isWanted = true;
    this.looking ??= this.all().finally(() => {
      this.looking = null;
    });
  }

  /** Resolves when the look under way has ended; there is no other. */
  async close(): Promise<void> {
    this.isClosed = true;
    await this.looking;
  }

  private async all(): Promise<void> {
    while (this.isWanted && !this.isClosed) {
      this.isWanted = false;
      try {
        await this.once();
      } catch (error) {
        if (!this.isClosed) this.failed(error);
      }
    }
  }
}
