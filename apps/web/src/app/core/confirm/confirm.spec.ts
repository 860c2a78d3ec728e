import { TestBed } from '@angular/core/testing';
import { settled } from '../../testing/session';
import { Confirm } from './confirm';

describe('Confirm', () => {
  const dialogs = HTMLDialogElement.prototype;

  beforeEach(() => {
    // The test world knows the dialog element but cannot open it.
    dialogs.showModal = function (this: HTMLDialogElement) {
      this.open = true;
    };
    dialogs.close = function (this: HTMLDialogElement, value?: string) {
      this.open = false;
      if (value !== undefined) this.returnValue = value;
      this.dispatchEvent(new Event('close'));
    };
  });

  async function asked() {
    const answer = TestBed.inject(Confirm).ask({
      heading: 'Cancel the visits?',
      consequence: '9 visits of this store are cancelled.',
      action: 'Cancel the visits',
      destructive: true,
    });
    for (let n = 0; n < 20 && !document.querySelector('dialog[open]'); n++) await settled();
    TestBed.tick();
    const dialog = document.querySelector('dialog');
    if (!dialog) throw new Error('no dialog was opened');
    return { answer, dialog, buttons: dialog.querySelectorAll('button') };
  }

  it('says what would happen, and gives the focus back when it is done', async () => {
    const opener = document.createElement('button');
    document.body.append(opener);
    opener.focus();
    const { answer, dialog, buttons } = await asked();
    expect(dialog.textContent).toContain('9 visits of this store are cancelled.');
    buttons[1]?.click();
    expect(await answer).toBe(true);
    expect(document.querySelector('dialog')).toBeNull();
    expect(document.activeElement).toBe(opener);
  });

  it('takes closing for no', async () => {
    const { answer, dialog } = await asked();
    dialog.close();
    expect(await answer).toBe(false);
  });
});
