/** The entries used last, so many of them. */
export class Recent<T> {
  private readonly entries = new Map<string, T>();
  constructor(private readonly most: number) {}

  get(key: string): T | undefined {
    const entry = this.entries.get(key);
    if (entry !== undefined) this.set(key, entry);
    return entry;
  }

  set(key: string, entry: T): void {
    this.entries.delete(key);
    this.entries.set(key, entry);
    if (this.entries.size > this.most) this.entries.delete(this.entries.keys().next().value!);
  }

  has(key: string): boolean {
    return this.entries.has(key);
  }
}
