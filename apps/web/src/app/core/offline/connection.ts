import { Injectable, signal } from '@angular/core';

/** Whether the device believes that it is connected. */
@Injectable({ providedIn: 'root' })
export class Connection {
  readonly online = signal(navigator.onLine);

  constructor() {
    addEventListener('online', () => this.online.set(true));
    addEventListener('offline', () => this.online.set(false));
  }
}
