import { TestBed } from '@angular/core/testing';
import { provideRouter } from '@angular/router';
import { SwUpdate } from '@angular/service-worker';
import { Subject } from 'rxjs';
import { Messages } from './messages';
import { NewVersion } from './new-version';

describe('NewVersion', () => {
  const versionUpdates = new Subject<{ type: string }>();
  const unrecoverable = new Subject<unknown>();

  function watching(isEnabled: boolean): Messages {
    TestBed.configureTestingModule({
      providers: [
        provideRouter([]),
        { provide: SwUpdate, useValue: { isEnabled, versionUpdates, unrecoverable } },
      ],
    });
    TestBed.inject(NewVersion).watch();
    return TestBed.inject(Messages);
  }

  it('offers a version that is ready, not one that is only on its way', () => {
    const messages = watching(true);
    versionUpdates.next({ type: 'VERSION_DETECTED' });
    expect(messages.message()).toBeUndefined();
    versionUpdates.next({ type: 'VERSION_READY' });
    expect(messages.message()?.action?.label).toBe('Load it');
  });

  it('says when the old version cannot go on', () => {
    const messages = watching(true);
    unrecoverable.next({});
    expect(messages.message()?.text).toContain('has to be loaded again');
  });

  it('is silent where there is no service worker', () => {
    const messages = watching(false);
    versionUpdates.next({ type: 'VERSION_READY' });
    expect(messages.message()).toBeUndefined();
  });
});
