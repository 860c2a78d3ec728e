import { ChangeDetectionStrategy, Component, inject, signal } from '@angular/core';
import { FormControl, ReactiveFormsModule } from '@angular/forms';
import { MatButton } from '@angular/material/button';
import { Router, RouterLink } from '@angular/router';
import {
  type Choice,
  ChoiceChips,
  FormNotes,
  InstantPipe,
  LabelPipe,
  ListShell,
  listState,
  PageHead,
  SectionHead,
} from '@lib/ui';
import { firstValueFrom } from 'rxjs';
import { v7 } from 'uuid';
import { problemFrom } from '../../core/api/problem';
import { saveFile } from '../../core/api/save-file';
import { reloadOn } from '../../core/live/reload-on';
import { stateWords } from './import-words';
import { type ImportKind, ImportsApi } from './imports-api';

const kinds: readonly Choice<ImportKind>[] = [
  { value: 'stores', label: 'Stores, with client and contact' },
  { value: 'machines', label: 'Machines' },
  { value: 'parts', label: 'Parts' },
];

/** Sends a CSV file to be checked, and lists what was sent before. */
@Component({
  selector: 'tw-import-start',
  imports: [
    ChoiceChips,
    FormNotes,
    InstantPipe,
    LabelPipe,
    ListShell,
    MatButton,
    PageHead,
    ReactiveFormsModule,
    RouterLink,
    SectionHead,
  ],
  templateUrl: './import-start.html',
  styleUrl: './import-start.scss',
  changeDetection: ChangeDetectionStrategy.OnPush,
})
export class ImportStart {
  readonly #api = inject(ImportsApi);
  readonly #router = inject(Router);
  // One id for one chosen file: sending it again after no answer is the same import.
  #id = v7();

  protected readonly kinds = kinds;
  protected readonly stateWords = stateWords;
  protected readonly kind = new FormControl<ImportKind>('stores', { nonNullable: true });
  protected readonly file = signal<File | undefined>(undefined);
  protected readonly busy = signal(false);
  protected readonly notes = signal<readonly string[]>([]);

  protected readonly imports = listState((ask) => this.#api.list(ask), {
    sorts: { '-createdAt': 'Newest first' },
  });

  constructor() {
    reloadOn(this.imports, 'imports');
  }

  protected choose(event: Event): void {
    this.#take((event.target as HTMLInputElement).files?.[0]);
  }

  protected drop(event: DragEvent): void {
    event.preventDefault();
    this.#take(event.dataTransfer?.files[0]);
  }

  protected async send(): Promise<void> {
    const file = this.file();
    if (this.busy()) return;
    if (!file) {
      this.notes.set(['Choose a CSV file first.']);
      return;
    }
    this.busy.set(true);
    this.notes.set([]);
    try {
      const { id } = await firstValueFrom(this.#api.start(this.#id, this.kind.value, file));
      await this.#router.navigate(['/shop/imports', id]);
    } catch (error) {
      const problem = problemFrom(error);
      if (!problem.unanswered) this.#id = v7();
      this.notes.set([`${file.name} was not taken. ${problem.message}`]);
    } finally {
      this.busy.set(false);
    }
  }

  protected async saveTemplate(): Promise<void> {
    saveFile(await firstValueFrom(this.#api.template(this.kind.value)));
  }

  #take(file: File | undefined): void {
    this.#id = v7();
    this.file.set(file);
    this.notes.set([]);
  }
}
