/** The two commands as a shell sees them: one JSON object and 0 whatever the verdict, 2 and a sentence otherwise. */
import { spawnSync } from 'node:child_process';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';

const root = fileURLToPath(new URL('../..', import.meta.url));

function run(
  command: 'stand-in' | 'effect',
  ...words: readonly string[]
): { status: number | null; out: string; error: string } {
  const { status, stdout, stderr } = spawnSync(
    process.execPath,
    ['--import', 'tsx', `docker-free-scripts/commands/${command}.ts`, ...words],
    { cwd: root, encoding: 'utf8', timeout: 60_000 },
  );
  return { status, out: stdout, error: stderr };
}

describe('stand-in', () => {
  it.each([
    [['--wanted', 'CD4093BE', '--offered', 'CD4011BE', '--rails', '+5', '--use', 'timing'], 'refused'],
    [['--wanted', 'CD4093BE', '--offered', 'CD4093BE', '--rails', '±12'], 'same'],
    [
      [
        '--wanted',
        '100n C0G',
        '--offered',
        '100n X7R 50V',
        '--rails',
        '+12,-12',
        '--use',
        'decoupling',
        '--kind',
        'capacitor',
      ],
      'drop-in',
    ],
  ])('%j: %s', (words, verdict) => {
    const { status, out } = run('stand-in', ...words);
    expect(status).toBe(0);
    expect(JSON.parse(out)).toMatchObject({ verdict });
  });

  it.each([
    [['--wanted', 'CD4093BE', '--offered', '  ', '--rails', '+5']],
    [['--wanted', 'CD4093BE', '--rails', '+5']],
    [['--wanted', 'CD4093BE', '--offered', 'CD4011BE', '--rails', 'much']],
    [['--wanted', 'CD4093BE', '--offered', 'CD4011BE', '--rails', '-12,+12']],
    [['--wanted', 'CD4093BE', '--offered', 'CD4011BE', '--use', 'fun']],
    [['--wanted', 'CD4093BE', '--offered', 'CD4011BE', '--kind', 'gadget']],
    [['--matrix', 'nonsense']],
    [['--never-heard-of']],
  ])('%j cannot be answered', (words) => {
    const { status, out, error } = run('stand-in', ...words);
    expect(status).toBe(2);
    expect(out).toBe('');
    expect(error.trim().split('\n')[0]?.length).toBeGreaterThan(10);
  });
});

describe('effect', () => {
  it('prints the Schmitt oscillator’s 559.6 kHz', () => {
    const { status, out } = run(
      'effect',
      '--formula',
      'schmitt-rc',
      '--vdd',
      '5',
      '--vt-up',
      '2.9',
      '--vt-down',
      '1.9',
      '--r',
      '22k',
      '--c',
      '100p',
    );
    expect(status).toBe(0);
    expect(JSON.parse(out)).toMatchObject({ formula: 'schmitt-rc', unit: 'hertz', value: expect.closeTo(559_563, -1) });
  });

  it.each([
    [['--formula', 'rc-low-pass', '--r', '10k']],
    [['--formula', 'rc-low-pass', '--r', '-1', '--c', '1n']],
    [['--formula', 'rc-low-pass', '--r', '0', '--c', '1n']],
    [['--formula', 'rc-low-pass', '--r', 'much', '--c', '1n']],
    [['--formula', 'rc-low-pass', '--r', '10k', '--c', '1n', '--l', '1m']],
    [['--formula', 'perpetual-motion']],
    [[]],
  ])('%j cannot be computed', (words) => {
    const { status, out, error } = run('effect', ...words);
    expect(status).toBe(2);
    expect(out).toBe('');
    expect(error.length).toBeGreaterThan(10);
  });
});
