/**
 * WebAssembly as plain script, for browsers that have script but no WebAssembly: the very module that the others run,
 * translated when the page is opened. So there is one core, and its answers are the same bits.
 *
 * Translated is what the module's compiler makes of it: WebAssembly 1.0 with vectors, without blocks that give several
 * values. Anything else is refused by name (NotTranslated).
 */
import { translatedBody, type Signature } from './body';
import { NotTranslated, present } from './faults';
import { BinaryReader } from './reader';
import { runtime } from './runtime';

interface Import {
  readonly module: string;
  readonly name: string;
  readonly type: number;
}

interface Segment {
  /** Where its bytes go in memory, and where they are in the binary. */
  readonly to: string;
  readonly from: number;
  readonly length: number;
}

/** What the sections say, the bodies apart. */
interface Sections {
  types: Signature[];
  imports: Import[];
  /** The types of the functions that have a body. */
  defined: number[];
  /** Pages of memory at the beginning and at most. */
  pages: { least: number; most: number };
  tableLength: number;
  globals: string[];
  exports: { name: string; kind: number; index: number }[];
  elements: { at: string; functions: number[] }[];
  bodies: number[];
  segments: Segment[];
}

/**
 * An expression of script: a function that takes the binary again (for the contents of its memory) and the imports, and
 * gives the exports, as an instance of the module would have them.
 */
export function translate(binary: Uint8Array): string {
  const sections = readSections(binary);
  const { types, imports, defined } = sections;
  const surroundings = {
    types,
    functions: [...imports.map(({ type }) => type), ...defined].map((type) => present(types[type])),
  };
  const bodies = sections.bodies.map((at, index) => {
    const number = imports.length + index;
    const signature = present(surroundings.functions[number]);
    const parameters = Array.from({ length: signature.parameters }, (_, parameter) => `v${String(parameter)}`);
    const body = translatedBody(new BinaryReader(binary, at), signature, surroundings);
    return `function f${String(number)}(${parameters.join()}){${body}}\n`;
  });
  return `(binary,imports)=>{"use strict";${runtime}${memoryText(sections)}${importsText(imports)}${bodies.join('')}${exportsText(sections)}}`;
}

function memoryText({ pages, segments }: Sections): string {
  return `
let U8,I8,U16,I16,I32,I64,F32,F64,D;
const M={buffer:null,grow(more){const was=grow(more);if(was<0)throw new RangeError('memory is exhausted');return was}};
const view=buffer=>{M.buffer=buffer;U8=new Uint8Array(buffer);I8=new Int8Array(buffer);U16=new Uint16Array(buffer);I16=new Int16Array(buffer);I32=new Int32Array(buffer);I64=new BigInt64Array(buffer);F32=new Float32Array(buffer);F64=new Float64Array(buffer);D=new DataView(buffer)};
const grow=more=>{const was=U8.length>>>16,now=was+(more>>>0);if(now>${String(pages.most)})return -1;try{const old=U8,buffer=new ArrayBuffer(now*65536);new Uint8Array(buffer).set(old);view(buffer)}catch{return -1}return was};
view(new ArrayBuffer(${String(pages.least * 65536)}));
${segments.map(({ to, from, length }) => `U8.set(binary.subarray(${String(from)},${String(from + length)}),${to}>>>0);`).join('')}
`;
}

const importsText = (imports: readonly Import[]): string =>
  imports
    .map(
      ({ module, name }, index) =>
        `const f${String(index)}=imports[${JSON.stringify(module)}][${JSON.stringify(name)}];`,
    )
    .join('');

function exportsText({ tableLength, globals, exports, elements }: Sections): string {
  const text = ({ kind, index }: Sections['exports'][number]): string =>
    present(
      [
        `f${String(index)}`,
        '{get:i=>T[i],set:(i,f)=>{T[i]=f},get length(){return T.length}}',
        'M',
        `{value:g${String(index)}}`,
      ][kind],
    );
  const table = elements.flatMap(({ at, functions }) =>
    functions.map((index, place) => `T[${at}+${String(place)}]=f${String(index)};`),
  );
  return [
    ...globals.map((value, index) => `let g${String(index)}=${value};`),
    `const T=new Array(${String(tableLength)}).fill(null);`,
    ...table,
    `return{${exports.map((one) => `${JSON.stringify(one.name)}:${text(one)}`).join()}};`,
  ].join('');
}

function readSections(binary: Uint8Array): Sections {
  const reader = new BinaryReader(binary, 8);
  const sections: Sections = {
    types: [],
    imports: [],
    defined: [],
    pages: { least: 0, most: 65536 },
    tableLength: 0,
    globals: [],
    exports: [],
    elements: [],
    bodies: [],
    segments: [],
  };
  while (!reader.atEnd) {
    const kind = reader.byte();
    const next = reader.unsigned() + reader.at;
    readSection(kind, reader, sections);
    reader.at = next;
  }
  return sections;
}

function readSection(kind: number, reader: BinaryReader, sections: Sections): void {
  switch (kind) {
    case 1:
      sections.types = reader.list(() => {
        reader.byte();
        return {
          parameters: reader.list(() => reader.byte()).length,
          results: reader.list(() => reader.byte()).length,
        };
      });
      break;
    case 2:
      sections.imports = reader.list(() => {
        const [module, name] = [reader.name(), reader.name()];
        if (reader.byte() !== 0) throw new NotTranslated(`${module}.${name} is imported and no function.`);
        return { module, name, type: reader.unsigned() };
      });
      break;
    case 3:
      sections.defined = reader.list(() => reader.unsigned());
      break;
    case 4:
      reader.list(() => {
        reader.byte();
        sections.tableLength = limits(reader).least;
      });
      break;
    case 5:
      reader.list(() => {
        sections.pages = limits(reader);
      });
      break;
    case 6:
      sections.globals = reader.list(() => {
        reader.at += 2;
        return initial(reader);
      });
      break;
    case 7:
      sections.exports = reader.list(() => ({ name: reader.name(), kind: reader.byte(), index: reader.unsigned() }));
      break;
    case 8:
      throw new NotTranslated('The module has a start function.');
    case 9:
      sections.elements = reader.list(() => {
        if (reader.unsigned() !== 0) throw new NotTranslated('The table is filled in a way that is not known.');
        return { at: initial(reader), functions: reader.list(() => reader.unsigned()) };
      });
      break;
    case 10:
      sections.bodies = reader.list(() => {
        const length = reader.unsigned();
        reader.at += length;
        return reader.at - length;
      });
      break;
    case 11:
      sections.segments = reader.list(() => {
        if (reader.unsigned() !== 0) throw new NotTranslated('Memory is filled in a way that is not known.');
        const to = initial(reader);
        const length = reader.unsigned();
        reader.at += length;
        return { to, from: reader.at - length, length };
      });
      break;
  }
}

function limits(reader: BinaryReader): { least: number; most: number } {
  const bounded = reader.byte() === 1;
  const least = reader.unsigned();
  return { least, most: bounded ? reader.unsigned() : 65536 };
}

/** The constant that a global begins with, or that a segment goes to. */
function initial(reader: BinaryReader): string {
  const code = reader.byte();
  let text: string;
  if (code === 0x41) text = String(reader.signed());
  else if (code === 0x42) text = `${String(reader.signedLong())}n`;
  else if (code === 0x44) text = String(reader.double());
  else throw new NotTranslated(`A constant begins with 0x${code.toString(16)}.`);
  reader.byte();
  return text;
}
