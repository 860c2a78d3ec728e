import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { BehaviorSubject, type Observable, of, switchMap, throwError } from 'rxjs';
import { ListShellHarness } from '../testing/list-shell-harness';
import { ListShell } from './list-shell';
import { type ListPage, listState } from './list-state';

const answers = new BehaviorSubject<() => Observable<ListPage<string>>>(() => of(none));
const none: ListPage<string> = { items: [], next: null, count: { value: 0, capped: false } };

@Component({
  selector: 'tw-list-host',
  imports: [ListShell],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `
    <tw-list-shell
      [list]="list"
      searchLabel="Search stores"
      empty="Stores you add appear here."
      [csv]="true"
      (csvAsked)="exports = exports + 1"
    >
      @for (item of list.items(); track item) {
        <p class="row">{{ item }}</p>
      }
      <button emptyAction type="button">Add a store</button>
    </tw-list-shell>
  `,
})
class ListHost {
  exports = 0;
  readonly list = listState(() => answers.pipe(switchMap((answer) => answer())), {
    sorts: { name: 'Name', city: 'City' },
  });
}

async function shell(answer: () => Observable<ListPage<string>>) {
  answers.next(answer);
  const fixture = TestBed.createComponent(ListHost);
  const loader = TestbedHarnessEnvironment.loader(fixture);
  return { fixture, harness: await loader.getHarness(ListShellHarness) };
}

describe('ListShell', () => {
  it('shows the rows, how many there are, and no pages where one is enough', async () => {
    const { harness } = await shell(() =>
      of({ items: ['Foxglove Lane'], next: null, count: { value: 1, capped: false } }),
    );
    expect(await harness.text()).toContain('Foxglove Lane');
    expect(await harness.range()).toBe('1–1 of 1');
    expect(await harness.buttons()).toEqual(['Export CSV']);
  });

  it('says what will appear, with the one action that fills it', async () => {
    const { harness } = await shell(() => of(none));
    expect(await harness.text()).toContain('Stores you add appear here.');
    expect(await harness.buttons()).toContain('Add a store');
  });

  it('says what went wrong and tries again', async () => {
    const { harness } = await shell(() =>
      throwError(() => ({ title: 'The service cannot answer right now: try again' })),
    );
    expect(await harness.text()).toContain('The service cannot answer right now');
    answers.next(() => of({ items: ['Quay 9'], next: null, count: { value: 1, capped: false } }));
    await harness.press('Try again');
    expect(await harness.text()).toContain('Quay 9');
  });

  it('pages, and says that counting stopped', async () => {
    const { harness } = await shell(() =>
      of({ items: ['a', 'b'], next: 'c2', count: { value: 1000, capped: true } }),
    );
    expect(await harness.range()).toBe('1–2 of more than 1,000');
    await harness.press('Next');
    expect(await harness.range()).toBe('3–4 of more than 1,000');
    await harness.press('Previous');
    expect(await harness.range()).toBe('1–2 of more than 1,000');
  });

  it('asks for the export', async () => {
    const { harness, fixture } = await shell(() => of(none));
    await harness.press('Export CSV');
    expect(fixture.componentInstance.exports).toBe(1);
  });
});
