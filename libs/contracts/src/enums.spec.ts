import { symptomWords } from '@lib/domain';
import { symptom } from './enums';

describe('symptoms', () => {
  it('each have words that people use', () => {
    expect(Object.keys(symptomWords)).toEqual(symptom.options);
  });
});
