import { messageIdOf } from './message-id';

describe('the Message-ID of a mail', () => {
  it('is the same for the same mail, under the host it is sent from', () => {
    const id = '01890a5d-ac96-774b-bcce-b302099a8057';
    expect(messageIdOf(id, 'Harbour <post@harbour.example>')).toBe(`<${id}@harbour.example>`);
    expect(messageIdOf(id, 'post@harbour.example')).toBe(`<${id}@harbour.example>`);
  });
});
