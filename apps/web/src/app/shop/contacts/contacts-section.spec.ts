import { ChangeDetectionStrategy, Component } from '@angular/core';
import { TestBed } from '@angular/core/testing';
import { OpenForms } from '../../core/forms/open-forms';
import { Session } from '../../core/session/session';
import { AnsweringApi, onePage } from '../../testing/answering-api';
import { PageUnderTest } from '../../testing/page';
import { anAnswer } from '../../testing/session';
import { ContactsSection } from './contacts-section';

const contact = {
  id: 'k1',
  client: { id: 'c1', name: 'Alder & Finch' },
  store: null,
  name: 'Marguerite Alder',
  email: 'marguerite@alder.example',
  phone: null,
  getsStatements: true,
  getsVisits: false,
  endedAt: null,
  version: 2,
};

@Component({
  selector: 'tw-contacts-host',
  imports: [ContactsSection],
  providers: [OpenForms],
  changeDetection: ChangeDetectionStrategy.OnPush,
  template: `<tw-contacts-section clientId="c1" storeId="s1" [stores]="stores" />`,
})
class ContactsHost {
  readonly stores = [{ value: 's1', label: 'Foxglove Lane' }];
}

async function opened(permissions: ('contacts.read' | 'clients.change')[]) {
  const api = AnsweringApi.provide({
    'contacts.list': onePage([contact]),
    'contacts.create': contact,
    'contacts.end': { ...contact, endedAt: '2031-05-06T10:00:00Z', version: 3 },
  });
  const page = await PageUnderTest.open(ContactsHost, 'contacts', '/contacts');
  TestBed.inject(Session).take(anAnswer({ permissions }));
  await page.rest();
  return { api, page };
}

describe('ContactsSection', () => {
  it('says who is reached where and gets what', async () => {
    const { api, page } = await opened(['contacts.read']);
    expect(api.sent('contacts.list')[0]?.query).toMatchObject({ clientId: 'c1', storeId: 's1' });
    expect(page.text).toContain('marguerite@alder.example');
    expect(page.text).toContain('every store');
    expect(page.text).toContain('statements');
  });

  it('offers no change to who may not change', async () => {
    const { page } = await opened(['contacts.read']);
    expect(page.text).not.toContain('Add a contact');
    expect(page.text).not.toContain('Change');
  });

  it('does not take a contact for mails without an address', async () => {
    const { api, page } = await opened(['contacts.read', 'clients.change']);
    await page.press('Add a contact');
    await page.fill('Name', 'Ines Lark');
    await page.check('Gets word of each visit');
    await page.press('Add the contact');
    expect(page.text).toContain('Mails need an e-mail address.');
    await page.fill('E-mail address', 'ines@lark.example');
    await page.press('Add the contact');
    expect(api.sent('contacts.create')[0]?.body).toEqual({
      name: 'Ines Lark',
      email: 'ines@lark.example',
      phone: null,
      getsStatements: false,
      getsVisits: true,
      clientId: 'c1',
      storeId: 's1',
    });
  });
});
