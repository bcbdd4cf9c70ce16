import { readFileSync, readdirSync } from 'node:fs';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { readFormula } from '../../../web/src/panels/formula';
import type { MathNode } from '../../../web/src/panels/formula';

/** MathML without the marks that are not seen. */
function written({ tag, text, children }: MathNode): string {
  const inside = children ? children.map(written).join('') : (text ?? '').replace(/[\u2061\u2062]/g, '');
  return tag === 'mo' && inside === '' ? '' : `<${tag}>${inside}</${tag}>`;
}

function mathOf(formula: string): string {
  const node = readFormula(formula);
  return node ? written(node) : 'not read';
}

describe('formulas', () => {
  it('with indices below and powers above', () => {
    expect(mathOf('t_s')).toBe('<msub><mi>t</mi><mi>s</mi></msub>');
    expect(mathOf('e^(−z·t)')).toBe(
      '<msup><mi>e</mi><mrow><mo>−</mo><mrow><mi>z</mi><mo>·</mo><mi>t</mi></mrow></mrow></msup>',
    );
    expect(mathOf('x^2')).toBe('<msup><mi>x</mi><mn>2</mn></msup>');
  });

  it('divide all that stands before the stroke by what stands next', () => {
    expect(mathOf('a·b/c·d')).toBe(
      '<mrow><mfrac><mrow><mi>a</mi><mo>·</mo><mi>b</mi></mrow><mi>c</mi></mfrac><mo>·</mo><mi>d</mi></mrow>',
    );
  });

  it('leave out brackets that a fraction makes needless, and no others', () => {
    expect(mathOf('(a + b)/(c)')).toBe('<mfrac><mrow><mi>a</mi><mo>+</mo><mi>b</mi></mrow><mi>c</mi></mfrac>');
    expect(mathOf('(a + b)·c')).toBe(
      '<mrow><mrow><mo>(</mo><mrow><mi>a</mi><mo>+</mo><mi>b</mi></mrow><mo>)</mo></mrow><mo>·</mo><mi>c</mi></mrow>',
    );
  });

  it('keep brackets that round', () => {
    expect(mathOf('⌊x/y⌋')).toBe('<mrow><mo>⌊</mo><mfrac><mi>x</mi><mi>y</mi></mfrac><mo>⌋</mo></mrow>');
  });

  it('tell a minus from a hyphen within a word', () => {
    expect(mathOf('break-even − m')).toBe('<mrow><mi>break-even</mi><mo>−</mo><mi>m</mi></mrow>');
  });

  it('keep words apart and symbols together', () => {
    expect(mathOf('cost of buying')).toContain('<mtext>\u00a0</mtext>');
    expect(mathOf('z t')).toBe('<mrow><mi>z</mi><mi>t</mi></mrow>');
  });

  it('sum and multiply over many', () => {
    expect(mathOf('Σ_i c_i')).toContain('<munder><mo>∑</mo><mi>i</mi></munder>');
    expect(mathOf('∏ (1 − δ)')).toContain('<mo>∏</mo>');
  });

  it('which cannot be read are left as text', () => {
    for (const text of ['', '∏', '(a', 'a)', 'a +', 'a = ', '§', '((((', 'a_', '^2'])
      expect(readFormula(text)).toBeNull();
  });

  it('never hang on nesting', () => {
    expect(readFormula(`${'('.repeat(500)}x${')'.repeat(500)}`)).not.toBeNull();
  });

  it('of the core are all read', () => {
    const folder = fileURLToPath(new URL('../../../core/forward/', import.meta.url));
    const formulas = readdirSync(folder)
      .filter((name) => name.endsWith('.cpp'))
      .flatMap((name) => [...readFileSync(`${folder}${name}`, 'utf8').matchAll(/\.formula = "([^"]+)";/g)])
      .map(([, formula]) => formula ?? '');
    expect(formulas.length).toBeGreaterThan(8);
    expect(formulas.filter((formula) => readFormula(formula) === null)).toEqual([]);
  });
});
