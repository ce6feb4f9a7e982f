import { describe, expect, it } from 'vitest';
import { readRails, RailsError } from '@/lib/electronics/stand-in/read-rails';

describe('rails as people write them', () => {
  it.each<readonly [string, readonly number[]]>([
    ['+12,-12', [12, -12]],
    ['±12', [12, -12]],
    ['+/-15', [15, -15]],
    ['+/- 15 V', [15, -15]],
    ['12/-12', [12, -12]],
    ['+12V / -12V', [12, -12]],
    ['+5', [5]],
    ['5V', [5]],
    ['3.3 V', [3.3]],
    ['+12,+5,-12', [12, 5, -12]],
    ['±12, +5', [12, 5, -12]],
    ['+12,-12,+5', [12, 5, -12]],
    ['+12 -12', [12, -12]],
    ['+12 and −12', [12, -12]],
    ['-12', [-12]],
    ['±12V DC', [12, -12]],
  ])('%s', (text, rails) => {
    expect(readRails(text)).toEqual(rails);
  });
});

describe('rails that cannot be are refused with the reason', () => {
  it.each([
    ['', 'empty'],
    ['   ', 'empty'],
    ['twelve', 'not-a-number'],
    ['+12,,', 'not-a-number'],
    ['-12,+12', 'wrong-way-round'],
    ['-12/12', 'wrong-way-round'],
    ['0', 'zero'],
    ['+230', 'out-of-range'],
    ['+12,+12', 'twice'],
    ['1,2,3,4,5,6,7,8,9', 'too-many'],
    ['12'.repeat(80), 'too-many'],
    ['∞', 'not-a-number'],
  ])('%j: %s', (text, problem) => {
    let caught: unknown = null;
    try {
      readRails(text);
    } catch (error) {
      caught = error;
    }
    expect(caught).toBeInstanceOf(RailsError);
    expect(caught).toMatchObject({ problem });
  });
});
