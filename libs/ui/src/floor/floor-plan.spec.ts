import { TestbedHarnessEnvironment } from '@angular/cdk/testing/testbed';
import { TestKey } from '@angular/cdk/testing';
import { TestBed } from '@angular/core/testing';
import { FloorHarness } from '../testing/floor-harness';
import { type FloorBank, type FloorChoice } from './floor-bay';
import { FloorPlan } from './floor-plan';

const banks: FloorBank[] = [
  {
    id: 'a',
    name: 'A',
    bays: [
      { id: 'm1', label: 'A-01', kind: 'top_loader', state: 'up' },
      { id: 'm2', label: 'A-02', kind: 'top_loader', state: 'down', note: 'since Tuesday' },
      { id: 'm3', label: 'A-03', kind: 'top_loader', state: 'up' },
    ],
  },
  { id: 'x', name: 'X', bays: [] },
  { id: 'b', name: 'B', bays: [{ id: 'm4', label: 'B-01', kind: 'dryer', state: 'locked_out' }] },
];

async function floorWith(choice: FloorChoice) {
  const fixture = TestBed.createComponent(FloorPlan);
  fixture.componentRef.setInput('banks', banks);
  fixture.componentRef.setInput('choice', choice);
  const opened: string[] = [];
  fixture.componentInstance.opened.subscribe((bay) => opened.push(bay.label));
  const floor = await TestbedHarnessEnvironment.harnessForFixture(fixture, FloorHarness);
  return { floor, fixture, opened };
}

describe('FloorPlan', () => {
  it('names every bay with its machine, state and note', async () => {
    const { floor } = await floorWith('none');
    expect(await floor.bayNames()).toEqual([
      'A-01, top loader, up',
      'A-02, top loader, down: since Tuesday',
      'A-03, top loader, up',
      'B-01, dryer, locked out',
    ]);
  });

  it('has one tab stop and is walked with the arrow keys', async () => {
    const { floor } = await floorWith('none');
    expect(await floor.tabStops()).toEqual(['A-01']);
    await floor.press('A-01', TestKey.RIGHT_ARROW);
    await floor.press('A-02', TestKey.END);
    expect(await floor.tabStops()).toEqual(['A-03']);
    await floor.press('A-03', TestKey.DOWN_ARROW);
    expect(await floor.tabStops()).toEqual(['B-01']);
    expect(await floor.focused()).toBe('B-01');
    await floor.press('B-01', TestKey.UP_ARROW);
    expect(await floor.tabStops()).toEqual(['A-01']);
  });

  it('stays on the floor at its edges', async () => {
    const { floor } = await floorWith('none');
    await floor.press('A-01', TestKey.LEFT_ARROW);
    await floor.press('A-01', TestKey.UP_ARROW);
    expect(await floor.tabStops()).toEqual(['A-01']);
  });

  it('chooses several by key and by click, and lets go of them again', async () => {
    const { floor, fixture } = await floorWith('many');
    await floor.press('A-01', TestKey.ENTER);
    await floor.click('B-01');
    expect(fixture.componentInstance.chosen()).toEqual(['m1', 'm4']);
    await floor.click('A-01');
    expect(await floor.chosen()).toEqual(['B-01']);
  });

  it('chooses only one where one is asked for', async () => {
    const { floor, fixture } = await floorWith('one');
    await floor.click('A-01');
    await floor.click('A-03');
    expect(fixture.componentInstance.chosen()).toEqual(['m3']);
  });

  it('opens a machine without claiming that it is selected', async () => {
    const { floor, opened } = await floorWith('none');
    await floor.click('A-02');
    expect(opened).toEqual(['A-02']);
    expect(await floor.chosen()).toEqual([]);
  });

  it('shows what is known of the bay that has the focus', async () => {
    const { floor } = await floorWith('none');
    await floor.focus('A-02');
    expect(await floor.caption()).toBe('A-02 · Top loader, down · since Tuesday');
  });
});
