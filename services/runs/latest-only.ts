import { log } from "../log";

/** Writes the latest of the values that are offered, one write at a time and no more often than given. */
export class LatestOnly<Value> {
  private next: { value: Value } | null = null;
  private timer: NodeJS.Timeout | null = null;
  private writing: Promise<void> = Promise.resolve();
  private lastAt = -Infinity;

  constructor(
    private readonly everyMs: number,
    private readonly write: (value: Value) => Promise<void>,
  ) {}

  offer(value: Value): void {
    this.next = { value };
    if (this.timer) return;
    const waitMs = Math.max(0, this.lastAt + this.everyMs - performance.now());
    this.timer = setTimeout(() => this.flush(), waitMs);
  }

  /** Drop what was not written yet and wait for what is being written, so that nothing comes after this. */
  async settled(): Promise<void> {
    if (this.timer) clearTimeout(this.timer);
    this.timer = null;
    this.next = null;
    await this.writing;
  }

  private flush(): void {
    this.timer = null;
    const offered = this.next;
    this.next = null;
    if (!offered) return;
    this.lastAt = performance.now();
    this.writing = this.writing
      .then(() => this.write(offered.value))
      .catch((error: unknown) => log.warn({ err: error }, "progress not written"));
  }
}
