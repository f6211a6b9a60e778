import { ServiceBusyError } from "./errors";

interface Waiting {
  begin: () => void;
  giveUp: (reason: unknown) => void;
}

/** Lets so many pieces of work run at a time; the others wait in the order in which they came. */
export class Turns {
  private running = 0;
  private readonly queue = new Set<Waiting>();

  /**
   * @param places       how many may run at a time, at least 1
   * @param mostWaiting  how many may wait
   */
  constructor(
    private readonly places: number,
    private readonly mostWaiting: number,
  ) {}

  /** How many wait now. */
  get waiting(): number {
    return this.queue.size;
  }

  /**
   * Does a piece of work when its turn comes. The place is free again when the work ends, however it ends.
   *
   * @param signal  takes the work out of the queue; once it runs, breaking off is its own affair
   * @throws {ServiceBusyError} when too many wait already
   */
  async take<Value>(work: () => Promise<Value>, signal?: AbortSignal): Promise<Value> {
    await this.enter(signal);
    try {
      return await work();
    } finally {
      this.leave();
    }
  }

  /** Sends everybody away who waits; what runs goes on. */
  dismiss(reason: Error): void {
    for (const { giveUp } of [...this.queue]) giveUp(reason);
  }

  private async enter(signal?: AbortSignal): Promise<void> {
    signal?.throwIfAborted();
    if (this.running < this.places) {
      this.running += 1;
      return;
    }
    if (this.queue.size >= this.mostWaiting) throw new ServiceBusyError();
    await new Promise<void>((resolve, reject) => {
      const stop = () => waiting.giveUp(signal?.reason);
      const leaveQueue = () => {
        this.queue.delete(waiting);
        signal?.removeEventListener("abort", stop);
      };
      const waiting: Waiting = {
        begin: () => {
          leaveQueue();
          resolve();
        },
        giveUp: (reason) => {
          leaveQueue();
          reject(reason);
        },
      };
      this.queue.add(waiting);
      signal?.addEventListener("abort", stop, { once: true });
    });
  }

  /** The place goes straight to whoever waits longest, so that nobody overtakes. */
  private leave(): void {
    const [next] = this.queue;
    if (next) next.begin();
    else this.running -= 1;
  }
}
