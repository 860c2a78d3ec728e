import { ApplicationRef, createComponent, inject, Injectable } from '@angular/core';
import { type ConfirmQuestion } from './question';

/** Asks before something that cannot be undone, with the consequence in figures. */
@Injectable({ providedIn: 'root' })
export class Confirm {
  readonly #application = inject(ApplicationRef);

  async ask(question: ConfirmQuestion): Promise<boolean> {
    const { ConfirmDialog } = await import('./confirm-dialog');
    const opener = document.activeElement as HTMLElement | null;
    const dialog = createComponent(ConfirmDialog, {
      environmentInjector: this.#application.injector,
    });
    dialog.setInput('question', question);
    this.#application.attachView(dialog.hostView);
    document.body.append(dialog.location.nativeElement as HTMLElement);
    return new Promise((resolve) => {
      dialog.instance.answered.subscribe((answer) => {
        dialog.destroy();
        opener?.focus();
        resolve(answer);
      });
    });
  }
}
