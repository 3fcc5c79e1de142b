import { randomUUID } from "node:crypto";
import { EventEmitter } from "node:events";
import { mkdirSync, readFileSync, readdirSync, renameSync, writeFileSync } from "node:fs";
import { join } from "node:path";

/** A message as it came over SMTP: who it was really for, and when. */
export interface StoredMessage {
  id: string;
  receivedAt: string;
  mailFrom: string;
  recipients: string[];
}

/** Every message a `.eml` with its envelope beside it; names sort by time of arrival. */
export class MessageStore {
  private readonly arrivals = new EventEmitter().setMaxListeners(0);
  private readonly messages: StoredMessage[];

  constructor(private readonly folder: string) {
    mkdirSync(folder, { recursive: true, mode: 0o700 });
    this.messages = readdirSync(folder)
      .filter((name) => name.endsWith(".json"))
      .sort()
      .map((name) => JSON.parse(readFileSync(join(folder, name), "utf8")) as StoredMessage);
  }

  add(source: Buffer, envelope: { mailFrom: string; recipients: string[] }, now = new Date()): StoredMessage {
    const id = `${now.toISOString().replace(/[^0-9]/g, "")}-${randomUUID().slice(0, 8)}`;
    const message = { id, receivedAt: now.toISOString(), ...envelope };
    writeFileSync(join(this.folder, `${id}.eml`), source, { mode: 0o600 });
    const draft = join(this.folder, `${id}.draft`);
    writeFileSync(draft, JSON.stringify(message), { mode: 0o600 });
    renameSync(draft, join(this.folder, `${id}.json`));
    this.messages.push(message);
    this.arrivals.emit("message");
    return message;
  }

  /** Newest first; only those to the address when one is given. */
  list(to?: string): StoredMessage[] {
    const wanted = to?.trim().toLowerCase();
    const all = [...this.messages].reverse();
    return wanted
      ? all.filter((one) => one.recipients.some((address) => address.toLowerCase() === wanted))
      : all;
  }

  find(id: string): StoredMessage | undefined {
    return this.messages.find((message) => message.id === id);
  }

  source(message: StoredMessage): Buffer {
    return readFileSync(join(this.folder, `${message.id}.eml`));
  }

  /** The address's messages as soon as there are `count` of them, or what is there when the time is up. */
  waitFor(to: string | undefined, count: number, waitMs: number): Promise<StoredMessage[]> {
    return new Promise((resolve) => {
      const finish = () => {
        clearTimeout(timer);
        this.arrivals.off("message", look);
        resolve(this.list(to));
      };
      const look = () => {
        if (this.list(to).length >= count) finish();
      };
      const timer = setTimeout(finish, waitMs);
      this.arrivals.on("message", look);
      look();
    });
  }
}
