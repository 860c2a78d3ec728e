import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestBed } from '@angular/core/testing';
import { MatAutocompleteHarness } from '@angular/material/autocomplete/testing';
import { of } from 'rxjs';
import { FindField } from './find-field';

const stores = [
  { id: 's1', name: 'Foxglove Lane' },
  { id: 's2', name: 'Quay Street' },
];

describe('FindField', () => {
  async function opened() {
    const fixture = TestBed.createComponent(FindField<(typeof stores)[number]>);
    const find = jest.fn((typed: string) => of(stores.filter(({ name }) => name.includes(typed))));
    const set = (name: string, value: unknown) => fixture.componentRef.setInput(name, value);
    set('label', 'Store');
    set('find', find);
    set('words', ({ name }: { name: string }) => name);
    set('hint', 'By name');
    set('none', 'No store is called so.');
    const picked = jest.fn();
    fixture.componentInstance.picked.subscribe(picked);
    const field =
      await TestbedHarnessEnvironment.loader(fixture).getHarness(MatAutocompleteHarness);
    const type = async (words: string) => {
      await field.enterText(words);
      await new Promise((resolve) => setTimeout(resolve, 300));
      await fixture.whenStable();
    };
    const hint = () => (fixture.nativeElement as HTMLElement).textContent ?? '';
    return { field, find, hint, picked, type };
  }

  it('asks once typing pauses, gives out what is picked, and is empty for the next', async () => {
    const { field, find, picked, type } = await opened();
    await type('Quay');
    expect(find.mock.calls).toEqual([['Quay']]);
    await field.selectOption({ text: 'Quay Street' });
    expect(picked).toHaveBeenCalledWith(stores[1]);
    expect(await field.getValue()).toBe('');
  });

  it('says that nothing is called so', async () => {
    const { hint, type } = await opened();
    expect(hint()).toContain('By name');
    await type('Elm');
    expect(hint()).toContain('No store is called so.');
  });
});
