/**
 * Runs one task at a time and of those that wait only the newest: what a drag asks for in between is out of date
 * before its turn comes.
 */
export class Latest<T> {
  private running = false;
  private waiting: T | null = null;

  constructor(private readonly run: (task: T) => Promise<void>) {}

  ask(task: T): void {
    this.waiting = task;
    if (!this.running) void this.drain();
  }

  private async drain(): Promise<void> {
    this.running = true;
    try {
      while (this.waiting !== null) {
        const task = this.waiting;
        this.waiting = null;
        await this.run(task);
      }
    } finally {
      this.running = false;
    }
  }
}
