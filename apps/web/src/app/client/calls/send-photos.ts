import { inject, Injectable } from '@angular/core';
import { counted } from '@lib/ui/words/words';
import { firstValueFrom } from 'rxjs';
import { type CallPhoto, CallsApi } from './calls-api';

/** Adds photos to a call, one after another: a weak signal does not carry several at once. */
@Injectable({ providedIn: 'root' })
export class SendPhotos {
  readonly #api = inject(CallsApi);

  /** The photos that did not arrive. */
  async send(callId: string, photos: readonly CallPhoto[]): Promise<readonly CallPhoto[]> {
    const failed: CallPhoto[] = [];
    for (const photo of photos) {
      try {
        await firstValueFrom(this.#api.addPhoto(callId, photo));
      } catch {
        failed.push(photo);
      }
    }
    return failed;
  }
}

export function notArrived(count: number): string {
  return `${counted(count, 'photo')} did not arrive. Add ${count === 1 ? 'it' : 'them'} again.`;
}
