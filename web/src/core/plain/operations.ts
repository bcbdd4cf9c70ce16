/**
 * What each operation of WebAssembly is in script, by its code. `A`, `B` and `C` stand for its operands.
 *
 * A whole number of 32 bits is a number from -2^31 up, one of 64 bits a bigint from -2^63 up, a vector a list of four
 * whole numbers of 32 bits. What an operation refuses (a quotient by zero, a number out of range) is not refused here:
 * the module is made of C++ in which that never happens.
 */

/** Comparisons: their text is true or false. */
export const comparisons: Readonly<Record<number, string>> = {
  0x45: 'A===0', // i32
  0x46: 'A===B',
  0x47: 'A!==B',
  0x48: 'A<B',
  0x49: 'A>>>0<B>>>0',
  0x4a: 'A>B',
  0x4b: 'A>>>0>B>>>0',
  0x4c: 'A<=B',
  0x4d: 'A>>>0<=B>>>0',
  0x4e: 'A>=B',
  0x4f: 'A>>>0>=B>>>0',
  0x50: 'A===0n', // i64
  0x51: 'A===B',
  0x52: 'A!==B',
  0x53: 'A<B',
  0x54: 'u(A)<u(B)',
  0x55: 'A>B',
  0x56: 'u(A)>u(B)',
  0x57: 'A<=B',
  0x58: 'u(A)<=u(B)',
  0x59: 'A>=B',
  0x5a: 'u(A)>=u(B)',
  0x5b: 'A===B', // f32
  0x5c: 'A!==B',
  0x5d: 'A<B',
  0x5e: 'A>B',
  0x5f: 'A<=B',
  0x60: 'A>=B',
  0x61: 'A===B', // f64
  0x62: 'A!==B',
  0x63: 'A<B',
  0x64: 'A>B',
  0x65: 'A<=B',
  0x66: 'A>=B',
};

export const calculations: Readonly<Record<number, string>> = {
  0x67: 'clz(A)', // i32
  0x68: 'ctz(A)',
  0x69: 'popcnt(A)',
  0x6a: '(A+B|0)',
  0x6b: '(A-B|0)',
  0x6c: 'imul(A,B)',
  0x6d: '(A/B|0)',
  0x6e: '((A>>>0)/(B>>>0)|0)',
  0x6f: '(A%B|0)',
  0x70: '((A>>>0)%(B>>>0)|0)',
  0x71: '(A&B)',
  0x72: '(A|B)',
  0x73: '(A^B)',
  0x74: '(A<<B)',
  0x75: '(A>>B)',
  0x76: '(A>>>B|0)',
  0x77: 'rotl(A,B)',
  0x78: 'rotl(A,-B)',
  0x79: 'clz64(A)', // i64
  0x7a: 'ctz64(A)',
  0x7b: 'popcnt64(A)',
  0x7c: 's(A+B)',
  0x7d: 's(A-B)',
  0x7e: 's(A*B)',
  0x7f: 's(A/B)',
  0x80: 's(u(A)/u(B))',
  0x81: '(A%B)',
  0x82: 's(u(A)%u(B))',
  0x83: '(A&B)',
  0x84: '(A|B)',
  0x85: '(A^B)',
  0x86: 's(A<<(B&63n))',
  0x87: '(A>>(B&63n))',
  0x88: 's(u(A)>>(B&63n))',
  0x89: 'rotl64(A,B)',
  0x8a: 'rotl64(A,-B)',
  0x8b: 'abs(A)', // f32
  0x8c: '(-A)',
  0x8d: 'ceil(A)',
  0x8e: 'floor(A)',
  0x8f: 'trunc(A)',
  0x90: 'nearest(A)',
  0x91: 'fround(sqrt(A))',
  0x92: 'fround(A+B)',
  0x93: 'fround(A-B)',
  0x94: 'fround(A*B)',
  0x95: 'fround(A/B)',
  0x96: 'min(A,B)',
  0x97: 'max(A,B)',
  0x98: 'copysign(A,B)',
  0x99: 'abs(A)', // f64
  0x9a: '(-A)',
  0x9b: 'ceil(A)',
  0x9c: 'floor(A)',
  0x9d: 'trunc(A)',
  0x9e: 'nearest(A)',
  0x9f: 'sqrt(A)',
  0xa0: '(A+B)',
  0xa1: '(A-B)',
  0xa2: '(A*B)',
  0xa3: '(A/B)',
  0xa4: 'min(A,B)',
  0xa5: 'max(A,B)',
  0xa6: 'copysign(A,B)',
  0xa7: 'Number(BigInt.asIntN(32,A))', // from one kind of number to another
  0xa8: '(A|0)',
  0xa9: '(A|0)',
  0xaa: '(A|0)',
  0xab: '(A|0)',
  0xac: 'BigInt(A)',
  0xad: 'BigInt(A>>>0)',
  0xae: 's(BigInt(trunc(A)))',
  0xaf: 's(BigInt(trunc(A)))',
  0xb0: 's(BigInt(trunc(A)))',
  0xb1: 's(BigInt(trunc(A)))',
  0xb2: 'fround(A)',
  0xb3: 'fround(A>>>0)',
  0xb6: 'fround(A)',
  0xb7: 'A',
  0xb8: '(A>>>0)',
  0xb9: 'Number(A)',
  0xba: 'Number(u(A))',
  0xbb: 'A',
  0xbc: '(F[0]=A,I[0])',
  0xbd: '(G[0]=A,L[0])',
  0xbe: '(I[0]=A,F[0])',
  0xbf: '(L[0]=A,G[0])',
  0xc0: '(A<<24>>24)', // a sign drawn out
  0xc1: '(A<<16>>16)',
  0xc2: 'BigInt.asIntN(8,A)',
  0xc3: 'BigInt.asIntN(16,A)',
  0xc4: 'BigInt.asIntN(32,A)',
};

/** Those after the prefix 0xfc that take values only: numbers cut to the nearest that there is. */
export const saturating: Readonly<Record<number, string>> = {
  0: '(cut(A,-2147483648,2147483647)|0)',
  1: '(cut(A,0,4294967295)|0)',
  2: '(cut(A,-2147483648,2147483647)|0)',
  3: '(cut(A,0,4294967295)|0)',
  4: 'cut64(A,-9223372036854775808n,9223372036854775807n)',
  5: 's(cut64(A,0n,18446744073709551615n))',
  6: 'cut64(A,-9223372036854775808n,9223372036854775807n)',
  7: 's(cut64(A,0n,18446744073709551615n))',
};

/** How memory is read and written: the list it is seen as, the bytes taken, the method of a DataView. */
export interface Access {
  readonly list: string;
  readonly bytes: 1 | 2 | 4 | 8;
  readonly method: string;
  /** What is read or written, `A`, as the value's kind of number. */
  readonly as: string;
}

const access = (list: string, bytes: Access['bytes'], method: string, as = 'A'): Access => ({
  list,
  bytes,
  method,
  as,
});

export const loads: Readonly<Record<number, Access>> = {
  0x28: access('I32', 4, 'Int32'),
  0x29: access('I64', 8, 'BigInt64'),
  0x2a: access('F32', 4, 'Float32'),
  0x2b: access('F64', 8, 'Float64'),
  0x2c: access('I8', 1, 'Int8'),
  0x2d: access('U8', 1, 'Uint8'),
  0x2e: access('I16', 2, 'Int16'),
  0x2f: access('U16', 2, 'Uint16'),
  0x30: access('I8', 1, 'Int8', 'BigInt(A)'),
  0x31: access('U8', 1, 'Uint8', 'BigInt(A)'),
  0x32: access('I16', 2, 'Int16', 'BigInt(A)'),
  0x33: access('U16', 2, 'Uint16', 'BigInt(A)'),
  0x34: access('I32', 4, 'Int32', 'BigInt(A)'),
  0x35: access('I32', 4, 'Int32', 'BigInt(A>>>0)'),
};

export const stores: Readonly<Record<number, Access>> = {
  0x36: access('I32', 4, 'Int32'),
  0x37: access('I64', 8, 'BigInt64'),
  0x38: access('F32', 4, 'Float32'),
  0x39: access('F64', 8, 'Float64'),
  0x3a: access('I8', 1, 'Int8'),
  0x3b: access('I16', 2, 'Int16'),
  0x3c: access('I8', 1, 'Int8', 'Number(BigInt.asIntN(8,A))'),
  0x3d: access('I16', 2, 'Int16', 'Number(BigInt.asIntN(16,A))'),
  0x3e: access('I32', 4, 'Int32', 'Number(BigInt.asIntN(32,A))'),
};
