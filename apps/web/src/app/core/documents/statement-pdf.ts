import { ChangeDetectionStrategy, Component, inject, input, signal } from '@angular/core';
import { MatButton } from '@angular/material/button';
import { problemText } from '@lib/ui/notes/problem-text';
import { firstValueFrom } from 'rxjs';
import { Api } from '../api/api';
import { openFile } from '../api/save-file';
import { Messages } from '../messages/messages';

/** Opens the PDF of a statement, once it is made: for the shop and for its client. */
@Component({
  selector: 'tw-statement-pdf',
  imports: [MatButton],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <button
      matButton="outlined"
      type="button"
      [disabled]="!ready() || opening()"
      disabledInteractive
      (click)="open()"
    >
      {{ ready() ? 'Open the PDF' : 'The PDF is being made' }}
    </button>
  `,
  styles: `
    :host {
      display: contents;
    }
  `,
})
export class StatementPdf {
  readonly #api = inject(Api);
  readonly #messages = inject(Messages);

  readonly statementId = input.required<string>();
  readonly ready = input.required<boolean>();
  protected readonly opening = signal(false);

  protected async open(): Promise<void> {
    if (!this.ready() || this.opening()) return;
    this.opening.set(true);
    try {
      const params = { statementId: this.statementId() };
      openFile(await firstValueFrom(this.#api.file('statements.pdf', { params })));
    } catch (problem) {
      this.#messages.say(problemText(problem));
    } finally {
      this.opening.set(false);
    }
  }
}
