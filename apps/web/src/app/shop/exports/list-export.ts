import { inject, Injectable, signal } from '@angular/core';
import { type ParamsOf } from '@lib/contracts/web';
import { problemText } from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { Api } from '../../core/api/api';
import { saveFile } from '../../core/api/save-file';
import { Messages } from '../../core/messages/messages';

/** Hands a whole list to the browser as CSV. */
@Injectable({ providedIn: 'root' })
export class ListExport {
  readonly #api = inject(Api);
  readonly #messages = inject(Messages);
  readonly busy = signal(false);

  async save(kind: ParamsOf<'exports.download'>['kind']): Promise<void> {
    if (this.busy()) return;
    this.busy.set(true);
    try {
      const file = await firstValueFrom(this.#api.file('exports.download', { params: { kind } }));
      saveFile(file);
      this.#messages.say(`${file.name} holds all ${kind}, and opens in a spreadsheet.`);
    } catch (problem) {
      this.#messages.say(problemText(problem));
    } finally {
      this.busy.set(false);
    }
  }
}
