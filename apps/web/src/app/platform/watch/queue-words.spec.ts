import { queueWords } from './queue-words';

describe('queueWords', () => {
  it('says what the work in a queue is', () => {
    expect(queueWords('deliveries-send')).toBe('Mails of shops');
  });

  it('leaves a queue it does not know its name in the logs', () => {
    expect(queueWords('of-tomorrow')).toBe('of-tomorrow');
  });
});
