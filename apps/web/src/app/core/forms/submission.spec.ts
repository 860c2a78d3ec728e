import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { FormControl, FormGroup, ReactiveFormsModule, Validators } from '@angular/forms';
import { type Observable, of, Subject, throwError } from 'rxjs';
import { settled } from '../../testing/session';
import { Problem } from '../api/problem';
import { submission } from './submission';

let send: (key: string) => Observable<string>;
let refused: ((problem: Problem) => boolean) | undefined;

@Component({
  selector: 'tw-form-host',
  imports: [ReactiveFormsModule],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<form [formGroup]="form"><input formControlName="name" /></form>`,
})
class FormHost {
  readonly form = new FormGroup({ name: new FormControl('', Validators.required) });
  readonly done: string[] = [];
  readonly saving = submission(this.form, (key) => send(key), {
    done: (answer) => this.done.push(answer),
    refused: (problem) => refused?.(problem) ?? false,
  });
}

async function host(name: string) {
  const fixture = TestBed.createComponent(FormHost);
  document.body.append(fixture.nativeElement as HTMLElement);
  fixture.componentInstance.form.setValue({ name });
  fixture.componentInstance.form.markAsDirty();
  await fixture.whenStable();
  return fixture.componentInstance;
}

describe('submission', () => {
  beforeEach(() => (refused = undefined));

  it('sends nothing that is not valid, and leads to the first error', async () => {
    send = () => throwError(() => new Error('must not be sent'));
    const page = await host('');
    await page.saving.submit();
    await settled();
    expect(page.form.touched).toBe(true);
    expect(document.activeElement?.tagName).toBe('INPUT');
  });

  it('sends once however often it is asked to', async () => {
    const answer = new Subject<string>();
    const sent = jest.fn(() => answer);
    send = sent;
    const page = await host('Quay 9');
    const first = page.saving.submit();
    await page.saving.submit();
    expect(page.saving.busy()).toBe(true);
    answer.next('stored');
    await first;
    expect(sent).toHaveBeenCalledTimes(1);
    expect(page.done).toEqual(['stored']);
    expect(page.form.dirty).toBe(false);
    expect(page.saving.busy()).toBe(false);
  });

  it('keeps its key after no answer, and takes another after any answer', async () => {
    const keys: string[] = [];
    const outcomes: Observable<string>[] = [
      throwError(() => new Problem('no-answer', 0, 'There was no answer.')),
      throwError(() => new Problem('unavailable', 503, 'Try again')),
      throwError(() => new Problem('conflict', 409, 'Taken')),
      of('stored'),
      of('stored'),
    ];
    send = (key) => {
      keys.push(key);
      return outcomes.shift() ?? of('');
    };
    const page = await host('Quay 9');
    for (let n = 0; n < 5; n++) await page.saving.submit();
    expect(keys[0]).toBe(keys[1]);
    expect(keys[1]).toBe(keys[2]);
    expect(new Set(keys).size).toBe(3);
  });

  it('shows a refusal, and lets it go with the next attempt', async () => {
    send = () => throwError(() => new Problem('conflict', 409, 'Taken', 'Bay A-04 is taken.'));
    const page = await host('Quay 9');
    await page.saving.submit();
    expect(page.saving.notes()).toEqual(['Bay A-04 is taken.']);
    expect(page.form.dirty).toBe(true);
    send = () => of('stored');
    await page.saving.submit();
    expect(page.saving.notes()).toEqual([]);
  });

  it('leaves a refusal to the page that takes care of it', async () => {
    send = () => throwError(() => new Problem('stale-version', 412, 'Changed meanwhile'));
    refused = (problem) => problem.kind === 'stale-version';
    const page = await host('Quay 9');
    await page.saving.submit();
    expect(page.saving.notes()).toEqual([]);
  });
});
