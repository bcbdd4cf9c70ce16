import { spawnSync } from 'node:child_process';
import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { openCore } from '../../web/tools/open-core.mjs';
import { buildFolder } from '../page/driver/built';

/** The three builds of the core that must answer alike, to the byte. */
export type CoreName = 'program' | 'module' | 'plain script';

/** Every request's answer, in order. */
export type AnswerAll = (requests: readonly string[]) => string[];

const packedFolder = resolve(buildFolder, 'packed');
export const programFile = resolve(buildFolder, 'forwright');

/** The native program, given one request a line; a request holds no line end of its own. */
export const answerByProgram: AnswerAll = (requests) => {
  const input = requests.map((request) => `${request}\n`).join('');
  const { stdout, error } = spawnSync(programFile, { input, encoding: 'utf8', maxBuffer: 1 << 30 });
  if (error) throw error;
  const answers = stdout.split('\n');
  if (answers.pop() !== '' || answers.length !== requests.length) {
    throw new Error(`The program answered ${answers.length} of ${requests.length} requests.`);
  }
  return answers;
};

/** The core as the page carries it. */
export async function openAnswering(kind: 'module' | 'plain'): Promise<AnswerAll> {
  const core = await openCore(packedFolder, kind);
  return (requests) => requests.map((request) => core.answer(request));
}

export async function everyCore(): Promise<Record<CoreName, AnswerAll>> {
  return {
    program: answerByProgram,
    module: await openAnswering('module'),
    'plain script': await openAnswering('plain'),
  };
}

export function schema(): object {
  const file = new URL('../../core/contract/forwright-1.schema.json', import.meta.url);
  return JSON.parse(readFileSync(file, 'utf8')) as object;
}
