import {
  afterNextRender,
  ChangeDetectionStrategy,
  Component,
  type ElementRef,
  input,
  output,
  viewChild,
} from '@angular/core';
import { MatButton } from '@angular/material/button';
import { type ConfirmQuestion } from './question';

/** The browser's own modal dialog: it keeps the focus inside and closes on Escape by itself. */
@Component({
  selector: 'tw-confirm-dialog',
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <dialog
      #dialog
      aria-labelledby="tw-confirm-heading"
      aria-describedby="tw-confirm-consequence"
      (close)="answered.emit(dialog.returnValue === 'yes')"
    >
      <h2 id="tw-confirm-heading">{{ question().heading }}</h2>
      <p id="tw-confirm-consequence">{{ question().consequence }}</p>
      <div class="actions">
        <button matButton="outlined" type="button" (click)="dialog.close()">
          {{ question().stay ?? 'Keep as it is' }}
        </button>
        <button
          matButton="filled"
          type="button"
          [class.tw-destructive]="question().destructive"
          (click)="dialog.close('yes')"
        >
          {{ question().action }}
        </button>
      </div>
    </dialog>
  `,
  styles: `
    dialog {
      max-inline-size: min(30rem, calc(100vw - 2rem));
      padding: 1.5rem;
      border: 1px solid var(--tw-hairline);
      border-radius: var(--tw-corner);
      background: var(--tw-sheet);
      color: var(--tw-ink);
    }
    dialog::backdrop {
      background: rgb(0 0 0 / 0.5);
    }
    h2 {
      margin: 0 0 0.5rem;
    }
    p {
      margin: 0 0 1.5rem;
    }
    .actions {
      display: flex;
      flex-wrap: wrap;
      justify-content: flex-end;
      gap: 0.5rem;
    }
  `,
})
export class ConfirmDialog {
  readonly question = input.required<ConfirmQuestion>();
  readonly answered = output<boolean>();
  protected readonly dialogElement = viewChild.required<ElementRef<HTMLDialogElement>>('dialog');

  constructor() {
    afterNextRender(() => this.dialogElement().nativeElement.showModal());
  }
}
