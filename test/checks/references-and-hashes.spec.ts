import { canonicalJson, isValidRfReference, printedRfReference, rfReference } from '@lib/domain';

describe('creditor references, ISO 11649', () => {
  /** Source: python-stdnum, stdnum/iso11649.py, its documentation. */
  it('judges the published examples of python-stdnum', () => {
    expect(isValidRfReference('RF18 5390 0754 7034')).toBe(true);
    expect(isValidRfReference('RF18 5390 0754 70Y')).toBe(true);
    expect(isValidRfReference('RF17 5390 0754 7034')).toBe(false);
  });

  /** Source: the tests of creditor_reference (Elixir), iso11649_test.exs. */
  it('judges the examples of another implementation', () => {
    for (const valid of ['RF471234567890', 'RF18000000000539007547034', 'RF71 2348 231'])
      expect(isValidRfReference(valid)).toBe(true);
    expect(isValidRfReference('123456789')).toBe(false);
  });

  it('computes their check digits and prints them in fours', () => {
    expect(rfReference('539007547034')).toBe('RF18539007547034');
    expect(rfReference('53900754-70y')).toBe('RF185390075470Y');
    expect(rfReference('1234567890')).toBe('RF471234567890');
    expect(printedRfReference('RF712348231')).toBe('RF71 2348 231');
  });

  it('finds every single mistyped digit and every swap of neighbours', () => {
    // What ISO 7064 promises of MOD 97-10 for numbers.
    const good = rfReference('2026-0142');
    for (let at = 4; at < good.length; at += 1) {
      for (const other of [...'0123456789'].filter((digit) => digit !== good[at])) {
        expect(isValidRfReference(good.slice(0, at) + other + good.slice(at + 1))).toBe(false);
      }
      if (at + 1 === good.length || good[at] === good[at + 1]) continue;
      const swapped = `${good.slice(0, at)}${good[at + 1]}${good[at]}${good.slice(at + 2)}`;
      expect(isValidRfReference(swapped)).toBe(false);
    }
  });

  it('refuses what is too long, empty or in another alphabet', () => {
    expect(() => rfReference('1'.repeat(22))).toThrow(RangeError);
    expect(() => rfReference(' - ')).toThrow(RangeError);
    expect(() => rfReference('Rechnung ü1')).toThrow(RangeError);
    expect(isValidRfReference(`RF18${'0'.repeat(22)}`)).toBe(false);
  });
});

describe('canonical JSON, RFC 8785', () => {
  /** Source: RFC 8785, 3.2.2 and 3.2.3 (the same sample is in cyberphone/json-canonicalization). */
  it('writes the sample of the standard', () => {
    const sample: unknown = JSON.parse(`{
      "numbers": [333333333.33333329, 1E30, 4.50, 2e-3, 0.000000000000000000000000001],
      "string": "\\u20ac$\\u000F\\u000aA'\\u0042\\u0022\\u005c\\\\\\"\\/",
      "literals": [null, true, false]
    }`);
    expect(canonicalJson(sample)).toBe(
      '{"literals":[null,true,false],' +
        '"numbers":[333333333.3333333,1e+30,4.5,0.002,1e-27],' +
        '"string":"€$\\u000f\\nA\'B\\"\\\\\\\\\\"/"}',
    );
  });

  /** Source: RFC 8785, 3.2.3, the sorting sample: order by UTF-16 code units, not code points. */
  it('sorts keys as the standard does', () => {
    const sample = {
      '\u20ac': 'Euro Sign',
      '\r': 'Carriage Return',
      '\ufb33': 'Hebrew Letter Dalet With Dagesh',
      '1': 'One',
      '\ud83d\ude00': 'Emoji: Grinning Face',
      '\u0080': 'Control',
      '\u00f6': 'Latin Small Letter O With Diaeresis',
    };
    const order = Object.values(JSON.parse(canonicalJson(sample)) as Record<string, string>);
    // JSON.parse keeps the order of the text, but for keys that look like array indexes.
    expect(canonicalJson(sample).startsWith('{"\\r":"Carriage Return","1":"One",')).toBe(true);
    expect(order.slice(-5)).toEqual([
      'Control',
      'Latin Small Letter O With Diaeresis',
      'Euro Sign',
      'Emoji: Grinning Face',
      'Hebrew Letter Dalet With Dagesh',
    ]);
  });
});
