import type { ServerResponse } from 'node:http';
import type { EventName, Events } from '../contract/requests';

/** Enough for a window that was asleep during a scan; older ones are forgotten. */
const KEPT_EVENTS = 2000;

/**
 * Sends events to every open window as Server-Sent Events. They are numbered, so that a browser that lost its
 * connection names the last one it saw and gets what it missed.
 */
export class EventStream {
  private readonly windows = new Set<ServerResponse>();
  private readonly kept: string[] = [];
  private count = 0;

  post<E extends EventName>(name: E, payload: Events[E]): void {
    this.count += 1;
    // JSON has no line breaks of its own, so the message is one `data` line
    const message = `id: ${this.count}\ndata: ${JSON.stringify({ name, payload })}\n\n`;
    this.kept.push(message);
    if (this.kept.length > KEPT_EVENTS) this.kept.shift();
    for (const window of this.windows) window.write(message);
  }

  /** @param lastSeen - the `Last-Event-ID` header; absent on a first connection, which starts with what comes next */
  connect(response: ServerResponse, lastSeen: string | undefined): void {
    response.writeHead(200, { 'Content-Type': 'text/event-stream; charset=utf-8' });
    response.write(': connected\n\n');
    for (const message of this.missedSince(lastSeen)) response.write(message);
    this.windows.add(response);
    response.on('close', () => this.windows.delete(response));
  }

  close(): void {
    for (const window of this.windows) window.end();
  }

  private missedSince(lastSeen: string | undefined): readonly string[] {
    if (lastSeen === undefined || !/^\d+$/.test(lastSeen)) return [];
    const missed = Math.min(this.kept.length, Math.max(0, this.count - Number(lastSeen)));
    return missed === 0 ? [] : this.kept.slice(-missed);
  }
}
