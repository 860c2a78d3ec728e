interface ServerEvent {
  readonly event: string;
  readonly data: string;
}

/**
 * Takes the text of an event stream apart as it arrives (HTML Living Standard, 9.2.6). The browser's
 * own EventSource cannot send the access token, so the stream is read by hand.
 */
export class EventReader {
  #rest = '';
  #event = '';
  #data: string[] = [];

  /** The events completed by this piece of text, which may end anywhere. */
  read(text: string): ServerEvent[] {
    const lines = (this.#rest + text).split(/\r\n|\n|\r(?!$)/);
    this.#rest = lines.pop() ?? '';
    return lines.flatMap((line) => this.#line(line));
  }

  #line(line: string): ServerEvent[] {
    if (line === '') return this.#dispatch();
    const colon = line.indexOf(':');
    if (colon === 0) return [];
    const name = colon < 0 ? line : line.slice(0, colon);
    const value = colon < 0 ? '' : line.slice(colon + 1).replace(/^ /, '');
    if (name === 'event') this.#event = value;
    if (name === 'data') this.#data.push(value);
    return [];
  }

  #dispatch(): ServerEvent[] {
    const event = { event: this.#event || 'message', data: this.#data.join('\n') };
    const empty = this.#data.length === 0;
    this.#event = '';
    this.#data = [];
    return empty ? [] : [event];
  }
}
