/**
 * The operations on vectors (after the prefix 0xfd) that the core's compiled code has: whole numbers of 32 and 64
 * bits, numbers of double precision, bits and bytes. `d`, `l`, `w` and `b` go through a vector's doubles, long and
 * ordinary whole numbers and bytes; their last operand says what is done to each (runtime.ts).
 */
export const vectorCalculations: Readonly<Record<number, string>> = {
  14: 'swizzle(A,B)',
  15: 'splat8(A)',
  16: 'splat16(A)',
  17: '[A,A,A,A]',
  18: 'splat64(A)',
  20: 'splatDouble(A)',
  35: 'b2(A,B,eq)', // comparisons
  36: 'b2(A,B,ne)',
  55: 'w2(A,B,eq)',
  56: 'w2(A,B,ne)',
  57: 'w2(A,B,lt)',
  58: 'w2(A,B,ltU)',
  59: 'w2(A,B,gt)',
  60: 'w2(A,B,gtU)',
  61: 'w2(A,B,le)',
  62: 'w2(A,B,leU)',
  63: 'w2(A,B,ge)',
  64: 'w2(A,B,geU)',
  71: 'dc(A,B,eq)',
  72: 'dc(A,B,ne)',
  73: 'dc(A,B,lt)',
  74: 'dc(A,B,gt)',
  75: 'dc(A,B,le)',
  76: 'dc(A,B,ge)',
  214: 'l2(A,B,eqL)',
  215: 'l2(A,B,neL)',
  216: 'l2(A,B,ltL)',
  217: 'l2(A,B,gtL)',
  218: 'l2(A,B,leL)',
  219: 'l2(A,B,geL)',
  77: 'w1(A,not)', // bits
  78: 'w2(A,B,and)',
  79: 'w2(A,B,andNot)',
  80: 'w2(A,B,or)',
  81: 'w2(A,B,xor)',
  82: 'select(A,B,C)',
  83: '((A).some(isSet)?1:0)',
  99: 'allBytes(A)',
  100: 'signsOfBytes(A)',
  163: '((A).every(isSet)?1:0)',
  195: 'allLong(A)',
  160: 'w1(A,absW)', // whole numbers of 32 bits
  161: 'w1(A,neg)',
  171: 'ws(A,B,shl)',
  172: 'ws(A,B,shrS)',
  173: 'ws(A,B,shrU)',
  174: 'w2(A,B,plus)',
  177: 'w2(A,B,minus)',
  181: 'w2(A,B,imul)',
  182: 'w2(A,B,min)',
  184: 'w2(A,B,max)',
  193: 'l1(A,neg)', // whole numbers of 64 bits
  199: 'widen(A,0,signed)',
  200: 'widen(A,2,signed)',
  201: 'widen(A,0,unsigned)',
  202: 'widen(A,2,unsigned)',
  203: 'ls(A,B,shl)',
  204: 'ls(A,B,shrS)',
  205: 'ls(A,B,shrUL)',
  206: 'l2(A,B,plus)',
  209: 'l2(A,B,minus)',
  213: 'l2(A,B,times)',
  220: 'l2(widen(A,0,signed),widen(B,0,signed),times)',
  221: 'l2(widen(A,2,signed),widen(B,2,signed),times)',
  222: 'l2(widen(A,0,unsigned),widen(B,0,unsigned),times)',
  223: 'l2(widen(A,2,unsigned),widen(B,2,unsigned),times)',
  116: 'd1(A,ceil)', // doubles
  117: 'd1(A,floor)',
  122: 'd1(A,trunc)',
  148: 'd1(A,nearest)',
  236: 'd1(A,abs)',
  237: 'd1(A,neg)',
  239: 'd1(A,sqrt)',
  240: 'd2(A,B,plus)',
  241: 'd2(A,B,minus)',
  242: 'd2(A,B,times)',
  243: 'd2(A,B,over)',
  244: 'd2(A,B,min)',
  245: 'd2(A,B,max)',
  246: 'd2(A,B,pmin)',
  247: 'd2(A,B,pmax)',
  252: 'toWhole(A,-2147483648,2147483647)',
  253: 'toWhole(A,0,4294967295)',
  254: 'toDouble(A[0],A[1])',
  255: 'toDouble(A[0]>>>0,A[1]>>>0)',
};

/** Those that also take a lane's number, `N`. */
export const laneCalculations: Readonly<Record<number, string>> = {
  21: '(bytesOf(A)[N]<<24>>24)',
  22: 'bytesOf(A)[N]',
  23: 'withByte(A,N,B)',
  27: '(A)[N]',
  28: 'withWord(A,N,B)',
  29: 'longsOf(A)[N]',
  30: 'withLong(A,N,B)',
  33: 'doublesOf(A)[N]',
  34: 'withDouble(A,N,B)',
};

/** Loads, of the address `A` with the offset added. */
export const vectorLoads: Readonly<Record<number, string>> = {
  0: 'load(A)',
  7: 'splat8(D.getUint8(A))',
  8: 'splat16(D.getUint16(A,true))',
  9: 'splat32(D.getInt32(A,true))',
  10: 'splat64(D.getBigInt64(A,true))',
  92: '[D.getInt32(A,true),0,0,0]',
  93: 'loadHalf(A)',
};

/** Loads and stores of one lane, `N`: of the address `A` and the vector `B`. */
export const laneLoads: Readonly<Record<number, string>> = {
  84: 'withByte(B,N,D.getUint8(A))',
  86: 'withWord(B,N,D.getInt32(A,true))',
  87: 'withLong(B,N,D.getBigInt64(A,true))',
};
export const laneStores: Readonly<Record<number, string>> = {
  88: 'D.setUint8(A,bytesOf(B)[N])',
  90: 'D.setInt32(A,(B)[N],true)',
  91: 'D.setBigInt64(A,longsOf(B)[N],true)',
};
