// The native program as it stands in a pipeline.
import { spawn, spawnSync } from 'node:child_process';
import { once } from 'node:events';
import { readFileSync } from 'node:fs';
import { createInterface } from 'node:readline';
import { describe, expect, test } from 'vitest';
import { programFile } from './cores';

const demonstration = JSON.stringify(
  JSON.parse(readFileSync(new URL('../../web/demonstration/share.json', import.meta.url), 'utf8')),
);
const run = (input: string, ...given: string[]) =>
  spawnSync(programFile, given, { input, encoding: 'utf8', maxBuffer: 1 << 30 });

describe('the program', () => {
  test('ends with 0 when every answer was ok, and answers a last line that lacks its end', () => {
    const { status, stdout } = run(`${demonstration}\n${demonstration}`);
    expect(
      stdout
        .trimEnd()
        .split('\n')
        .map((line) => (JSON.parse(line) as { ok: boolean }).ok),
    ).toEqual([true, true]);
    expect(status).toBe(0);
  });

  test('ends with 1 when any answer was not, and answers every line in its order', () => {
    const { status, stdout } = run(`no JSON\n\n${demonstration}\n`);
    expect(
      stdout
        .trimEnd()
        .split('\n')
        .map((line) => (JSON.parse(line) as { ok: boolean }).ok),
    ).toEqual([false, false, true]);
    expect(status).toBe(1);
  });

  test('ends with 0 and no output when asked nothing', () => {
    expect(run('')).toMatchObject({ status: 0, stdout: '', stderr: '' });
  });

  test('ends with 2 for arguments it cannot use, and says which', () => {
    for (const given of [['--colour'], ['--help', '--loud'], ['file.json']]) {
      const { status, stdout, stderr } = run('', ...given);
      expect(status).toBe(2);
      expect(stdout).toBe('');
      expect(stderr).toContain(given.at(-1));
    }
  });

  test('tells its version, its schema and how it is used', () => {
    expect(run('', '--version').stdout).toMatch(/^forwright \d+\.\d+\.\d+\n$/);
    expect(JSON.parse(run('', '--schema').stdout)).toEqual(
      JSON.parse(readFileSync(new URL('../../core/contract/forwright-1.schema.json', import.meta.url), 'utf8')),
    );
    expect(run('', '--help').stdout).toContain('usage: forwright');
  });

  test('answers each line before it waits for the next', async () => {
    const program = spawn(programFile);
    const lines = createInterface({ input: program.stdout });
    for (let question = 0; question < 3; question += 1) {
      program.stdin.write(`${demonstration}\n`);
      const [line] = (await once(lines, 'line')) as [string];
      expect(JSON.parse(line)).toMatchObject({ ok: true });
    }
    program.stdin.end();
    expect(await once(program, 'close')).toEqual([0, null]);
  });

  test('refuses a line beyond 64 MB without keeping it, and goes on', () => {
    const limit = 64 * 1024 * 1024;
    const tooLong = `"${'x'.repeat(3 * limit)}"\n`;
    const measured = spawnSync('bash', ['-c', `ulimit -v ${(3 * limit) / 1024}; exec "$0"`, programFile], {
      input: `${tooLong}${demonstration}\n`,
      encoding: 'utf8',
    });
    const [refused, answered] = measured.stdout.split('\n').map((line) => (line === '' ? null : JSON.parse(line)));
    expect(refused).toMatchObject({ ok: false, errors: [{ at: '' }] });
    expect(answered).toMatchObject({ ok: true });
    expect(measured.status).toBe(1);
  });

  test('answers 100,000 requests without growing', async () => {
    const program = spawn(programFile, { stdio: ['pipe', 'pipe', 'inherit'] });
    const held = () => Number(/VmHWM:\s*(\d+) kB/.exec(readFileSync(`/proc/${program.pid}/status`, 'utf8'))![1]);
    const batch = `${demonstration}\n`.repeat(1000);
    let answered = 0;
    let afterFirst = 0;
    program.stdout.on('data', (bytes: Buffer) => {
      for (const byte of bytes) if (byte === 10) answered += 1;
    });
    for (let sent = 0; sent < 100; sent += 1) {
      if (!program.stdin.write(batch)) await once(program.stdin, 'drain');
      if (sent === 10) afterFirst = held();
    }
    const atEnd = held();
    program.stdin.end();
    expect(await once(program, 'close')).toEqual([0, null]);
    expect(answered).toBe(100_000);
    expect(atEnd).toBeLessThanOrEqual(afterFirst + 1024);
  });
});
