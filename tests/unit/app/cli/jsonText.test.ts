import { describe, expect, it } from 'vitest';
import { jsonText } from '../../../../app/cli/jsonText.js';

describe('jsonText', () => {
  it('keeps the content and lets no character act on a terminal', () => {
    const value = { text: 'a\u202eb\u001b[31m\u009bc\u2028é' };
    expect(JSON.parse(jsonText(value))).toEqual(value);
    // biome-ignore lint/suspicious/noControlCharactersInRegex: these must not be there
    expect(jsonText(value)).not.toMatch(/[\u0000-\u0009\u000b-\u001f\u007f-\u009f\u2028\u202e]/);
    expect(jsonText(value)).toContain('é');
  });
});
