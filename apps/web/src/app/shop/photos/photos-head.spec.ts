import { TestBed } from '@angular/core/testing';
import { Problem } from '../../core/api/problem';
import { Session } from '../../core/session/session';
import { AnsweringApi } from '../../testing/answering-api';
import { anAnswer } from '../../testing/session';
import { PhotosHead } from './photos-head';

describe('PhotosHead', () => {
  async function choosing(answer: object) {
    const api = AnsweringApi.provide({ 'files.add': answer });
    TestBed.inject(Session).take(anAnswer({ permissions: ['files.add'] }));
    const fixture = TestBed.createComponent(PhotosHead);
    fixture.componentRef.setInput('ownerKind', 'call');
    fixture.componentRef.setInput('ownerId', 'c1');
    const added = jest.fn();
    fixture.componentInstance.added.subscribe(added);
    await fixture.whenStable();
    const page = fixture.nativeElement as HTMLElement;
    const picker = page.querySelector('input') as HTMLInputElement;
    Object.defineProperty(picker, 'files', { value: [new File(['x'], 'valve.jpg')] });
    picker.dispatchEvent(new Event('change'));
    await fixture.whenStable();
    return { api, added, page };
  }

  it('adds the chosen photo to what the photos show, and says that it did', async () => {
    const { api, added, page } = await choosing({ id: 'f1' });
    expect(api.sent('files.add')[0]?.body).toEqual({ ownerKind: 'call', ownerId: 'c1' });
    expect(added).toHaveBeenCalledTimes(1);
    expect(page.querySelector('[role=alert]')?.textContent).toBe('');
  });

  it('names the photo that was refused', async () => {
    const { added, page } = await choosing(
      new Problem('invalid-request', 422, 'Refused', 'That is no photo.'),
    );
    expect(added).not.toHaveBeenCalled();
    expect(page.querySelector('[role=alert]')?.textContent).toBe(
      'valve.jpg was not added. That is no photo.',
    );
  });
});
