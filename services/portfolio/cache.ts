/** Keeps the most recently used values within a number of bytes, and never computes one of them twice at a time. */
export class ByteBoundedCache<Value> {
  private readonly entries = new Map<string, { value: Promise<Value>; bytes: number }>();
  private bytes = 0;

  /**
   * @param capacityBytes  what all kept values may come to; a larger value is returned but not kept
   * @param sizeOf         bytes a value takes, about
   */
  constructor(
    private readonly capacityBytes: number,
    private readonly sizeOf: (value: Value) => number,
  ) {}

  /** Bytes kept now. */
  get size(): number {
    return this.bytes;
  }

  /** Is the value of this key kept, or being computed? */
  has(key: string): boolean {
    return this.entries.has(key);
  }

  /** The value of this key, computed if it is not kept. A failure is not kept. */
  async get(key: string, compute: () => Promise<Value>): Promise<Value> {
    const known = this.entries.get(key);
    if (known) {
      this.entries.delete(key);
      this.entries.set(key, known);
      return known.value;
    }
    const entry = { value: compute(), bytes: 0 };
    this.entries.set(key, entry);
    try {
      const value = await entry.value;
      if (this.entries.get(key) === entry) this.account(key, entry, this.sizeOf(value));
      return value;
    } catch (error) {
      if (this.entries.get(key) === entry) this.entries.delete(key);
      throw error;
    }
  }

  private account(key: string, entry: { bytes: number }, bytes: number): void {
    if (bytes > this.capacityBytes) {
      this.entries.delete(key);
      return;
    }
    entry.bytes = bytes;
    this.bytes += bytes;
    for (const [oldest, kept] of this.entries) {
      if (this.bytes <= this.capacityBytes) break;
      // One that is still being computed takes no bytes yet.
      if (oldest === key || kept.bytes === 0) continue;
      this.entries.delete(oldest);
      this.bytes -= kept.bytes;
    }
  }
}
