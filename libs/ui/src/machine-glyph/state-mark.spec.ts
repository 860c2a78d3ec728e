import { TestBed } from '@angular/core/testing';
import { type MachineState } from '@lib/contracts/web';
import { StateMark } from './state-mark';

const states: MachineState[] = ['up', 'degraded', 'down', 'locked_out', 'retired'];

describe('StateMark', () => {
  it('has a shape of its own for every state', async () => {
    const shapes = new Set<string>();
    for (const state of states) {
      const fixture = TestBed.createComponent(StateMark);
      fixture.componentRef.setInput('state', state);
      await fixture.whenStable();
      const svg = (fixture.nativeElement as HTMLElement).querySelector('svg');
      shapes.add([...(svg?.children ?? [])].map((part) => part.outerHTML).join());
    }
    expect(shapes.size).toBe(states.length);
  });
});
