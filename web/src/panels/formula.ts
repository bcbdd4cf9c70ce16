/**
 * The core's formulas, one line of symbols (`F = [S·P(t_s) − Σ_i c_i]/P(T_s)`), as MathML. The core tells each formula
 * once, as text; this reads any of them, so that no formula is told a second time here. What it cannot read stays text.
 */
export interface MathNode {
  readonly tag: 'mrow' | 'mi' | 'mn' | 'mo' | 'mtext' | 'mfrac' | 'msub' | 'msup' | 'munder' | 'msqrt';
  readonly text?: string;
  readonly children?: readonly MathNode[];
  /** Of a bracket: no taller than a letter, as nothing tall is in it. */
  readonly low?: boolean;
}

type Kind = 'number' | 'name' | 'sign' | 'open' | 'close';
interface Token {
  readonly kind: Kind;
  readonly text: string;
  /** Whether a space stands before it. */
  readonly spaced: boolean;
}

const closing: Readonly<Record<string, string>> = { '(': ')', '[': ']', '{': '}', '⌊': '⌋', '⌈': '⌉' };
const patterns: readonly (readonly [Kind, RegExp])[] = [
  ['number', /^\d+(\.\d+)?(e[−-]?\d+)?/],
  // A hyphen or an apostrophe within a word is part of it; minus is written −.
  ['name', /^(\p{L}[\p{L}\d]*([-'’]\p{L}[\p{L}\d]*)*|∂|∞|…)/u],
  ['open', /^[([{⌊⌈]/],
  ['close', /^[)\]}⌋⌉]/],
  ['sign', /^[+−\-±·×*/=≤≥<>≈→^_,;:|%∏√]/],
];

class Unreadable extends Error {}

function tokens(formula: string): Token[] {
  const found: Token[] = [];
  let rest = formula;
  while (rest.trim() !== '') {
    const spaced = /^\s/.test(rest);
    rest = rest.trimStart();
    const [kind, text] = patterns
      .map(([kind, pattern]) => [kind, pattern.exec(rest)?.[0]] as const)
      .find(([, text]) => text !== undefined) ?? [undefined, undefined];
    if (kind === undefined || text === undefined) throw new Unreadable(rest);
    // Σ is a letter of the alphabet; here it is a sign, even written close to the name after it.
    const whole = text.startsWith('Σ') ? 'Σ' : text;
    found.push({ kind: whole === 'Σ' ? 'sign' : kind, text: whole, spaced });
    rest = rest.slice(whole.length);
  }
  return found;
}

const mo = (text: string): MathNode => ({ tag: 'mo', text });
const row = (...children: MathNode[]): MathNode =>
  children.length === 1 && children[0] ? children[0] : { tag: 'mrow', children };

/** Whether something taller than a line of letters is in it. */
function tall({ tag, children = [] }: MathNode): boolean {
  return tag === 'mfrac' || tag === 'munder' || children.some(tall);
}

const relations = new Set(['=', '≤', '≥', '<', '>', '≈', '→', ',', ';', ':', '|']);
const sums = new Set(['+', '−', '-', '±']);
const signOf: Readonly<Record<string, string>> = { '-': '−', '*': '·' };

/** Something read, and whether it is in brackets, which a fraction or an exponent does not need. */
interface Read {
  readonly node: MathNode;
  readonly inside?: MathNode;
}

class Reader {
  private at = 0;

  constructor(private readonly list: readonly Token[]) {}

  whole(): MathNode {
    const node = this.relation();
    if (this.peek()) throw new Unreadable('something is left over');
    return node;
  }

  private peek(): Token | undefined {
    return this.list[this.at];
  }

  private take(): Token {
    const token = this.list[this.at];
    if (!token) throw new Unreadable('it ends too early');
    this.at += 1;
    return token;
  }

  private next(...texts: string[]): boolean {
    const token = this.peek();
    return token?.kind === 'sign' && texts.includes(token.text);
  }

  private relation(): MathNode {
    const parts = [this.sum()];
    for (let token = this.peek(); token && relations.has(token.text); token = this.peek()) {
      parts.push(mo(this.take().text), this.sum());
    }
    return row(...parts);
  }

  private sum(): MathNode {
    const parts: MathNode[] = [];
    if (this.next(...sums)) parts.push(this.sign());
    parts.push(this.product());
    while (this.next(...sums)) parts.push(this.sign(), this.product());
    return row(...parts);
  }

  private sign(): MathNode {
    const { text } = this.take();
    return mo(signOf[text] ?? text);
  }

  private product(): MathNode {
    let parts: Read[] = [this.power()];
    const made = (): MathNode => row(...parts.map(({ node }) => node));
    for (;;) {
      const token = this.peek();
      if (!token || token.kind === 'close' || relations.has(token.text) || sums.has(token.text)) return made();
      if (token.text === '/') {
        this.take();
        const above = (parts.length === 1 && parts[0]?.inside) || made();
        const below = this.power();
        parts = [{ node: { tag: 'mfrac', children: [above, below.inside ?? below.node] } }];
      } else if (token.text === '·' || token.text === '×' || token.text === '*') {
        parts.push({ node: this.sign() }, this.power());
      } else {
        parts.push(this.beside(token), this.power());
      }
    }
  }

  /** What stands between two things written side by side: nothing to see between symbols, a space between words. */
  private beside({ kind, text }: Token): Read {
    const before = this.list[this.at - 1];
    const words = kind === 'name' && text.length > 1 && before?.kind === 'name' && before.text.length > 1;
    return { node: words ? { tag: 'mtext', text: '\u00a0' } : mo('\u2062') };
  }

  /** Something with what stands below, in brackets behind, or above it. */
  private power(): Read {
    const base = this.atom();
    let below: MathNode | undefined;
    if (this.next('_')) below = this.script();
    let node: MathNode = below ? { tag: 'msub', children: [base.node, below] } : base.node;
    if (this.calls()) node = row(node, mo('\u2061'), this.bracket().node);
    if (this.next('^')) node = { tag: 'msup', children: [node, this.script()] };
    return node === base.node ? base : { node };
  }

  /** A name with a bracket close behind it is a function of what is in it. */
  private calls(): boolean {
    const before = this.list[this.at - 1];
    const token = this.peek();
    return before?.kind === 'name' && token?.text === '(' && !token.spaced;
  }

  private script(): MathNode {
    this.take();
    if (this.next('−', '-')) return row(this.sign(), this.atom().node);
    const { node, inside } = this.atom();
    return inside ?? node;
  }

  private bracket(): Read {
    const open = this.take();
    const inside = this.relation();
    const close = this.take();
    if (close.text !== closing[open.text]) throw new Unreadable('a bracket is not closed');
    const fence = (text: string): MathNode => ({ ...mo(text), low: !tall(inside) });
    const node = row(fence(open.text), inside, fence(close.text));
    // Brackets that round say something and stay; others only hold together.
    return open.text === '⌊' || open.text === '⌈' ? { node } : { node, inside };
  }

  private atom(): Read {
    const token = this.peek();
    if (!token) throw new Unreadable('it ends too early');
    if (token.kind === 'open') return this.bracket();
    this.take();
    if (token.kind === 'number') return { node: this.number(token.text) };
    if (token.kind === 'name') return { node: { tag: 'mi', text: token.text } };
    if (token.text === 'Σ' || token.text === '∏') return { node: this.manyOf(token.text === 'Σ' ? '∑' : '∏') };
    if (token.text === '√') {
      const { node, inside } = this.power();
      return { node: { tag: 'msqrt', children: [inside ?? node] } };
    }
    throw new Unreadable(token.text);
  }

  private number(text: string): MathNode {
    const [mantissa = text, exponent] = text.split('e');
    if (exponent === undefined) return { tag: 'mn', text };
    const ten: MathNode = {
      tag: 'msup',
      children: [
        { tag: 'mn', text: '10' },
        { tag: 'mn', text: exponent.replace('-', '−') },
      ],
    };
    return mantissa === '1' ? ten : row({ tag: 'mn', text: mantissa }, mo('·'), ten);
  }

  /** A sum or product over many, with what it runs over below it. */
  private manyOf(sign: string): MathNode {
    const over = this.next('_') ? this.script() : undefined;
    const symbol: MathNode = over ? { tag: 'munder', children: [mo(sign), over] } : mo(sign);
    return row(symbol, this.product());
  }
}

/** Formulas are few and come again with every quote. */
const known = new Map<string, MathNode | null>();

/** The formula as MathML, or null where it cannot be read. */
export function readFormula(formula: string): MathNode | null {
  let root = known.get(formula);
  if (root === undefined) {
    root = freshlyRead(formula);
    known.set(formula, root);
  }
  return root;
}

function freshlyRead(formula: string): MathNode | null {
  try {
    return new Reader(tokens(formula)).whole();
  } catch (trouble) {
    if (trouble instanceof Unreadable) return null;
    throw trouble;
  }
}
