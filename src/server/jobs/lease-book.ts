/** How long a shard is one worker's before it is handed out again. */
export const leaseMs = 60_000;

interface Lease {
  holder: string;
  expiresAt: number;
}

/** Which shards are out, and to whom. Kept in memory, by a clock that is never set: a shard computed twice is harmless,
 *  so that a restart, which forgets the leases, costs at most what was under way, and a clock that jumps costs nothing.
 *  What must not be lost, the shards, is in the database. */
export class LeaseBook {
  private readonly points = new Map<string, Map<number, Lease>>();

  constructor(private readonly now: () => number = () => performance.now()) {}

  take(pointId: string, index: number, holder: string, ms: number = leaseMs): void {
    const point = this.points.get(pointId) ?? new Map<number, Lease>();
    point.set(index, { holder, expiresAt: this.now() + ms });
    this.points.set(pointId, point);
  }

  isOut(pointId: string, index: number): boolean {
    return this.leaseOf(pointId, index) !== undefined;
  }

  holderOf(pointId: string, index: number): string | undefined {
    return this.leaseOf(pointId, index)?.holder;
  }

  /** Shards of a point that are out. */
  countOut(pointId: string): number {
    const point = this.points.get(pointId);
    if (!point) return 0;
    for (const index of [...point.keys()]) this.leaseOf(pointId, index);
    return point.size;
  }

  release(pointId: string, index: number): void {
    const point = this.points.get(pointId);
    point?.delete(index);
    if (point?.size === 0) this.points.delete(pointId);
  }

  private leaseOf(pointId: string, index: number): Lease | undefined {
    const lease = this.points.get(pointId)?.get(index);
    if (!lease || lease.expiresAt > this.now()) return lease;
    this.release(pointId, index);
    return undefined;
  }
}

/** The server's own. */
export const leaseBook = new LeaseBook();
