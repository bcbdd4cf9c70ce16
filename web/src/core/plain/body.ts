import { calculations, comparisons, loads, saturating, stores, type Access } from './operations';
import { NotTranslated, present } from './faults';
import { asCondition, constant, globals, memory, together, variable, type Pending } from './pending';
import type { BinaryReader } from './reader';
import { laneCalculations, laneLoads, laneStores, vectorCalculations, vectorLoads } from './vectors';

export interface Signature {
  readonly parameters: number;
  readonly results: number;
}

/** What a function's body refers to. */
export interface Surroundings {
  readonly types: readonly Signature[];
  /** The signature of every function, the imported first. */
  readonly functions: readonly Signature[];
}

/** The types of values by their codes: what a variable holds before anything is put in. */
const beginnings: Readonly<Record<number, string>> = { 0x7f: '0', 0x7e: '0n', 0x7d: '0', 0x7c: '0', 0x7b: '[0,0,0,0]' };

/** A block, a loop or an `if` that is not ended yet. */
interface Frame {
  readonly kind: 'block' | 'loop' | 'if';
  readonly label: string;
  /** Values on the stack before it. */
  readonly height: number;
  readonly results: number;
}

/**
 * One function's body as script. WebAssembly computes on a stack; here the stack holds texts, each put into a variable
 * only when something would change what it depends on, so that most become one expression where they are used.
 *
 * The variable of the value at height h of the stack is `s<h>`. What stands at height h is made of what stood there and
 * above, so it uses no variable of a lower height, and putting lower values into theirs never disturbs it.
 */
class Body {
  private readonly out: string[] = [];
  private readonly stack: Pending[] = [];
  private readonly frames: Frame[] = [];
  private slots = 0;
  private labels = 0;

  constructor(
    private readonly code: BinaryReader,
    private readonly surroundings: Surroundings,
    private readonly signature: Signature,
  ) {}

  translate(): string {
    const variables = this.code
      .list(() => ({ count: this.code.unsigned(), type: this.code.byte() }))
      .flatMap(({ count, type }) => Array.from({ length: count }, () => beginnings[type] ?? '0'))
      .map((value, index) => `v${String(this.signature.parameters + index)}=${value}`);
    this.open('block', this.signature.results);
    while (this.frames.length > 0) this.operation(this.code.byte());
    const slots = Array.from({ length: this.slots }, (_, index) => `s${String(index)}`);
    const all = [...variables, ...slots].join();
    return (all && `let ${all};`) + this.out.join('');
  }

  // ---- the stack ----

  private push(value: Pending): void {
    this.stack.push(value);
  }

  private pop(): Pending {
    return present(this.stack.pop());
  }

  private popMany(count: number): Pending[] {
    return Array.from({ length: count }, () => this.pop()).reverse();
  }

  private slot(height: number): string {
    this.slots = Math.max(this.slots, height + 1);
    return `s${String(height)}`;
  }

  /** Puts the value at that height of the stack into its variable. Those that use the variable go first. */
  private settle(height: number): void {
    const value = this.stack[height];
    const slot = this.slot(height);
    if (value === undefined || value.text === slot) return;
    this.settleUsersOf(slot, height);
    this.out.push(`${slot}=${value.text};`);
    this.stack[height] = variable(slot);
  }

  private settleUsersOf(name: string, below = this.stack.length): void {
    for (let height = 0; height < below; height += 1) {
      if (present(this.stack[height]).uses.has(name)) this.settle(height);
    }
  }

  private settleAll(): void {
    for (let height = 0; height < this.stack.length; height += 1) {
      if (present(this.stack[height]).uses.size > 0) this.settle(height);
    }
  }

  private assign(name: string, value: Pending): void {
    if (value.text === name) return;
    this.settleUsersOf(name);
    this.out.push(`${name}=${value.text};`);
  }

  // ---- blocks ----

  /** The block that is as many blocks out. */
  private frame(out = 0): Frame {
    return present(this.frames.at(-1 - out));
  }

  private open(kind: Frame['kind'], results: number): void {
    this.settleAll();
    const label = `b${String(this.labels++)}`;
    this.frames.push({ kind, label, height: this.stack.length, results });
  }

  private blockResults(): number {
    const type = this.code.signed();
    if (type === -64) return 0;
    if (type < 0) return 1;
    const { parameters, results } = present(this.surroundings.types[type]);
    if (parameters > 0 || results > 1) throw new NotTranslated('A block takes or gives several values.');
    return results;
  }

  /** Puts a block's result, which is on top of the stack, where it is looked for after the block. */
  private giveResult(frame: Frame): void {
    if (frame.results === 0) return;
    const { text } = this.pop();
    const slot = this.slot(frame.height);
    if (text !== slot) this.out.push(`${slot}=${text};`);
  }

  private end(reachable: boolean): void {
    const frame = this.frame();
    if (this.frames.length === 1) {
      if (reachable) this.leaveFunction();
      this.frames.pop();
      return;
    }
    if (reachable) this.giveResult(frame);
    this.stack.length = frame.height;
    if (frame.kind === 'loop') this.out.push(reachable ? 'break;}' : '}');
    else this.out.push('}');
    this.frames.pop();
    if (frame.results > 0) this.push(variable(this.slot(frame.height)));
  }

  private otherwise(reachable: boolean): void {
    const frame = this.frame();
    if (reachable) this.giveResult(frame);
    this.stack.length = frame.height;
    this.out.push('}else{');
  }

  private leaveFunction(): void {
    if (this.signature.results > 0) this.out.push(`return ${this.pop().text};`);
  }

  /** The order to go to the end of a block, or the beginning of a loop, as many blocks out. */
  private jump(out: number): string {
    const frame = this.frame(out);
    if (frame === this.frames[0]) return frame.results > 0 ? `return ${present(this.stack.at(-1)).text};` : 'return;';
    return `${frame.kind === 'loop' ? 'continue' : 'break'} ${frame.label};`;
  }

  private branch(out: number): void {
    const frame = this.frame(out);
    if (frame !== this.frames[0] && frame.kind !== 'loop') this.giveResult(frame);
    this.out.push(this.jump(out));
    this.skip();
  }

  private branchIf(out: number): void {
    const condition = asCondition(this.pop());
    const frame = this.frame(out);
    if (this.resultsGiven(out) === 0) {
      this.out.push(`if(${condition})${this.jump(out)}`);
      return;
    }
    // The value stays on the stack where the branch is not taken.
    const height = this.stack.length - 1;
    this.settle(height);
    const slot = this.slot(frame.height);
    const given = frame === this.frames[0] ? '' : `${slot}=${present(this.stack[height]).text};`;
    this.out.push(`if(${condition}){${given}${this.jump(out)}}`);
  }

  private branchTable(): void {
    const targets = this.code.list(() => this.code.unsigned());
    const otherwise = this.code.unsigned();
    const index = this.pop();
    if ([...targets, otherwise].some((out) => this.resultsGiven(out) > 0)) {
      throw new NotTranslated('A table of branches gives a value.');
    }
    const cases = targets.map((out, at) =>
      // Cases that go the same way share their order.
      out === targets[at + 1] ? `case ${String(at)}:` : `case ${String(at)}:${this.jump(out)}`,
    );
    this.out.push(`switch(${index.text}){${cases.join('')}default:${this.jump(otherwise)}}`);
    this.skip();
  }

  /** How many values a branch takes along. */
  private resultsGiven(out: number): number {
    const frame = this.frame(out);
    return frame.kind === 'loop' ? 0 : frame.results;
  }

  /** Passes over what cannot be reached, up to the block's `else` or end. */
  private skip(): void {
    this.stack.length = this.frame().height;
    for (let depth = 0; ;) {
      const code = this.code.byte();
      if (depth === 0 && (code === 0x0b || code === 0x05)) {
        if (code === 0x0b) this.end(false);
        else this.otherwise(false);
        return;
      }
      if (code === 0x0b) depth -= 1;
      if (code === 0x02 || code === 0x03 || code === 0x04) depth += 1;
      skipOperands(this.code, code);
    }
  }

  // ---- operations ----

  private calculate(template: string, operands: number, lane?: number): void {
    const values = this.popMany(operands);
    this.push({ text: filled(template, values, lane), uses: together(values) });
  }

  private address(value: Pending, offset: number): string {
    return offset === 0 ? value.text : `${value.text}+${String(offset)}`;
  }

  private load({ list, bytes, method, as }: Access): void {
    const { aligned, offset } = this.memoryOperand(bytes);
    const base = this.pop();
    const address = this.address(base, offset);
    const read = aligned
      ? `${list}[${address}>>>${String(Math.log2(bytes))}]`
      : `D.get${method}(${address}>>>0${bytes > 1 ? ',true' : ''})`;
    this.push({ text: as.replace('A', () => read), uses: together([base], memory) });
  }

  private store({ list, bytes, method, as }: Access): void {
    const { aligned, offset } = this.memoryOperand(bytes);
    const [base, value] = this.popMany(2) as [Pending, Pending];
    this.settleUsersOf(memory);
    const address = this.address(base, offset);
    const written = as.replace('A', () => value.text);
    this.out.push(
      aligned
        ? `${list}[${address}>>>${String(Math.log2(bytes))}]=${written};`
        : `D.set${method}(${address}>>>0,${written}${bytes > 1 ? ',true' : ''});`,
    );
  }

  private memoryOperand(bytes: number): { aligned: boolean; offset: number } {
    const aligned = 2 ** this.code.unsigned() >= bytes;
    return { aligned, offset: this.code.unsigned() };
  }

  /** Something that may change whatever is not a variable of this function. */
  private effect(text: string, results: number): void {
    this.settleUsersOf(memory);
    this.settleUsersOf(globals);
    if (results > 1) throw new NotTranslated('A function gives several values.');
    if (results === 0) {
      this.out.push(`${text};`);
      return;
    }
    const slot = this.slot(this.stack.length);
    this.settleUsersOf(slot);
    this.out.push(`${slot}=${text};`);
    this.push(variable(slot));
  }

  private call(callee: string, { parameters, results }: Signature): void {
    this.effect(`${callee}(${this.popMany(parameters).map(textOf).join()})`, results);
  }

  private operation(code: number): void {
    const comparison = comparisons[code];
    const calculation = calculations[code];
    const load = loads[code];
    const store = stores[code];
    if (comparison !== undefined) {
      const values = this.popMany(operandsOf(comparison));
      const condition =
        code === 0x45 && values[0]?.condition !== undefined ? `!(${values[0].condition})` : filled(comparison, values);
      this.push({ text: `(${condition}?1:0)`, condition, uses: together(values) });
    } else if (calculation !== undefined) this.calculate(calculation, operandsOf(calculation));
    else if (load) this.load(load);
    else if (store) this.store(store);
    else this.structure(code);
  }

  private structure(code: number): void {
    const { code: reader } = this;
    switch (code) {
      case 0x00:
        this.out.push('trap();');
        this.skip();
        break;
      case 0x01:
        break;
      case 0x02:
      case 0x03:
        this.open(code === 0x02 ? 'block' : 'loop', this.blockResults());
        this.out.push(`${this.frame().label}:${code === 0x02 ? '' : 'for(;;)'}{`);
        break;
      case 0x04: {
        const results = this.blockResults();
        const condition = asCondition(this.pop());
        this.open('if', results);
        this.out.push(`${this.frame().label}:if(${condition}){`);
        break;
      }
      case 0x05:
        this.otherwise(true);
        break;
      case 0x0b:
        this.end(true);
        break;
      case 0x0c:
        this.branch(reader.unsigned());
        break;
      case 0x0d:
        this.branchIf(reader.unsigned());
        break;
      case 0x0e:
        this.branchTable();
        break;
      case 0x0f:
        this.branch(this.frames.length - 1);
        break;
      case 0x10: {
        const index = reader.unsigned();
        this.call(`f${String(index)}`, present(this.surroundings.functions[index]));
        break;
      }
      case 0x11: {
        const signature = present(this.surroundings.types[reader.unsigned()]);
        reader.unsigned();
        const index = this.pop();
        this.call(`T[${index.text}]`, signature);
        break;
      }
      case 0x1a: {
        this.pop();
        break;
      }
      case 0x1c:
      case 0x1b: {
        if (code === 0x1c) reader.list(() => reader.byte());
        const [one, other, condition] = this.popMany(3) as [Pending, Pending, Pending];
        this.push({
          text: `(${asCondition(condition)}?${one.text}:${other.text})`,
          uses: together([one, other, condition]),
        });
        break;
      }
      case 0x20:
        this.push(variable(`v${String(reader.unsigned())}`));
        break;
      case 0x21:
        this.assign(`v${String(reader.unsigned())}`, this.pop());
        break;
      case 0x22: {
        const name = `v${String(reader.unsigned())}`;
        this.assign(name, this.pop());
        this.push(variable(name));
        break;
      }
      case 0x23:
        this.push({ text: `g${String(reader.unsigned())}`, uses: new Set([globals]) });
        break;
      case 0x24: {
        const name = `g${String(reader.unsigned())}`;
        const value = this.pop();
        this.settleUsersOf(globals);
        this.out.push(`${name}=${value.text};`);
        break;
      }
      case 0x3f:
        reader.byte();
        this.push({ text: '(U8.length>>>16)', uses: new Set([memory]) });
        break;
      case 0x40:
        reader.byte();
        this.effect(`grow(${this.pop().text})`, 1);
        break;
      case 0x41:
        this.push(constant(numberText(reader.signed())));
        break;
      case 0x42:
        this.push(constant(longText(reader.signedLong())));
        break;
      case 0x43:
        this.push(constant(numberText(reader.float())));
        break;
      case 0x44:
        this.push(constant(numberText(reader.double())));
        break;
      case 0xfc:
        this.bulk(reader.unsigned());
        break;
      case 0xfd:
        this.vector(reader.unsigned());
        break;
      default:
        throw new NotTranslated(`The operation 0x${code.toString(16)} is not known.`);
    }
  }

  private bulk(code: number): void {
    const calculation = saturating[code];
    if (calculation !== undefined) this.calculate(calculation, 1);
    else if (code === 10 || code === 11) {
      this.code.at += code === 10 ? 2 : 1;
      this.effect(`${code === 10 ? 'copy' : 'fill'}(${this.popMany(3).map(textOf).join()})`, 0);
    } else throw new NotTranslated(`The operation 0xfc ${String(code)} is not known.`);
  }

  private vector(code: number): void {
    const calculation = vectorCalculations[code];
    const ofLane = laneCalculations[code];
    if (calculation !== undefined) this.calculate(calculation, operandsOf(calculation));
    else if (ofLane !== undefined) this.calculate(ofLane, operandsOf(ofLane), this.code.byte());
    else if (code === 12) this.push(constant(`[${this.code.vector().join()}]`));
    else if (code === 13) {
      const from = Array.from({ length: 16 }, () => this.code.byte());
      this.calculate(`shuffle(A,B,[${from.join()}])`, 2);
    } else this.vectorInMemory(code);
  }

  private vectorInMemory(code: number): void {
    const load = vectorLoads[code] ?? laneLoads[code];
    const store = code === 11 ? 'store(A,B)' : laneStores[code];
    const template = load ?? store;
    if (template === undefined) throw new NotTranslated(`The operation 0xfd ${String(code)} is not known.`);
    this.code.unsigned();
    const offset = this.code.unsigned();
    const lane = template.includes('N') ? this.code.byte() : undefined;
    const values = this.popMany(operandsOf(template));
    const [base, ...rest] = values as [Pending, ...Pending[]];
    const address = { ...base, text: `${this.address(base, offset)}>>>0` };
    const text = filled(template, [address, ...rest], lane);
    if (load === undefined) {
      this.settleUsersOf(memory);
      this.out.push(`${text};`);
    } else this.push({ text, uses: together(values, memory) });
  }
}

const textOf = ({ text }: Pending): string => text;

const operandsOf = (template: string): number => (/\bC\b/.test(template) ? 3 : /\bB\b/.test(template) ? 2 : 1);

function filled(template: string, values: readonly Pending[], lane?: number): string {
  return template.replace(/\b[ABCN]\b/g, (place) =>
    place === 'N' ? String(lane) : present(values[place.charCodeAt(0) - 'A'.charCodeAt(0)]).text,
  );
}

/** Negative numbers in brackets, so that no sign meets another. */
function numberText(value: number): string {
  const text = Object.is(value, -0) ? '-0' : String(value);
  return text.startsWith('-') ? `(${text})` : text;
}

function longText(value: bigint): string {
  return value < 0n ? `(${String(value)}n)` : `${String(value)}n`;
}

/** Passes over what stands behind an operation's code. */
function skipOperands(reader: BinaryReader, code: number): void {
  if (code === 0x02 || code === 0x03 || code === 0x04 || code === 0x41) reader.signed();
  else if (code === 0x42) reader.signedLong();
  else if (code === 0x43) reader.float();
  else if (code === 0x44) reader.double();
  else if (code === 0x0e) {
    reader.list(() => reader.unsigned());
    reader.unsigned();
  } else if (code === 0x11 || (code >= 0x28 && code <= 0x3e)) {
    reader.unsigned();
    reader.unsigned();
  } else if (code === 0x0c || code === 0x0d || code === 0x10 || (code >= 0x20 && code <= 0x24)) reader.unsigned();
  else if (code === 0x3f || code === 0x40) reader.byte();
  else if (code === 0x1c) reader.list(() => reader.byte());
  else if (code === 0xfc) skipBulk(reader, reader.unsigned());
  else if (code === 0xfd) skipVector(reader, reader.unsigned());
}

function skipBulk(reader: BinaryReader, code: number): void {
  for (let operands = code === 10 ? 2 : code === 11 ? 1 : 0; operands > 0; operands -= 1) reader.byte();
}

function skipVector(reader: BinaryReader, code: number): void {
  if (code === 12 || code === 13) reader.vector();
  else if (code <= 11 || code === 92 || code === 93 || (code >= 84 && code <= 91)) {
    reader.unsigned();
    reader.unsigned();
    if (code >= 84 && code <= 91) reader.byte();
  } else if (code >= 21 && code <= 34) reader.byte();
}

/** The body of a function, whose code `code` is at, as script. */
export function translatedBody(code: BinaryReader, signature: Signature, surroundings: Surroundings): string {
  return new Body(code, surroundings, signature).translate();
}
