import { expect, it } from 'vitest';
import { browserOf } from '../../../src/components/page/browser';

it.each([
  ['Mozilla/5.0 (X11; Linux x86_64; rv:128.0) Gecko/20100101 Firefox/128.0', 'Firefox on Linux'],
  ['Mozilla/5.0 (Windows NT 10.0; Win64; x64) AppleWebKit/537.36 (KHTML, like Gecko) Chrome/126.0.0.0 Safari/537.36 Edg/126.0.0.0', 'Edge on Windows'],
  ['Mozilla/5.0 (iPhone; CPU iPhone OS 17_5 like Mac OS X) AppleWebKit/605.1.15 (KHTML, like Gecko) Version/17.5 Mobile/15E148 Safari/604.1', 'Safari on iOS'],
  ['curl/8.5.0', 'curl'],
  ['something-else/1.0', 'something-else/1.0'],
  [null, 'not told'],
])('%s', (header, words) => expect(browserOf(header)).toBe(words)); // prettier-ignore
