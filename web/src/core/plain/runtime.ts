/**
 * What the translated module calls: the operations that are no single expression of script. A vector is a list of
 * four whole numbers of 32 bits, seen otherwise through `x` and `y`, on which nothing stays from one call to the next.
 */
export const runtime = `
const {imul,fround,abs,ceil,floor,trunc,sqrt,min,max,clz32:clz}=Math;
const F=new Float32Array(1),I=new Int32Array(F.buffer),G=new Float64Array(1),L=new BigInt64Array(G.buffer);
const s=a=>BigInt.asIntN(64,a),u=a=>BigInt.asUintN(64,a);
const trap=()=>{throw new Error('unreachable')};
const ctz=a=>a?31-clz(a&-a):32;
const popcnt=a=>{let n=0;for(;a;a&=a-1)n++;return n};
const rotl=(a,b)=>a<<b|a>>>(-b&31)&(b&31?-1:0);
const high=a=>Number(a>>32n),low=a=>Number(BigInt.asIntN(32,a));
const clz64=a=>BigInt(high(a)?clz(high(a)):32+clz(low(a)));
const ctz64=a=>BigInt(low(a)?ctz(low(a)):32+ctz(high(a)));
const popcnt64=a=>BigInt(popcnt(low(a))+popcnt(high(a)));
const rotl64=(a,b)=>s(u(a)<<(b&63n)|u(a)>>(-b&63n));
const nearest=a=>{if(!(abs(a)<4503599627370496))return a;const f=floor(a),d=a-f,n=d<.5?f:d>.5?f+1:f%2?f+1:f;return n===0&&(a<0||Object.is(a,-0))?-0:n};
const negative=a=>{G[0]=a;return L[0]<0n};
const copysign=(a,b)=>negative(a)===negative(b)?a:-a;
const cut=(a,least,most)=>a!==a?0:trunc(min(max(a,least),most));
const cut64=(a,least,most)=>a!==a?0n:a<=Number(least)?least:a>=Number(most)?most:BigInt(trunc(a));

const plus=(a,b)=>a+b,minus=(a,b)=>a-b,times=(a,b)=>a*b,over=(a,b)=>a/b,neg=a=>-a,absW=a=>a<0?-a|0:a,absL=a=>a<0n?-a:a;
const mean=(a,b)=>a+b+1>>1,within=(least,most,f)=>(a,b)=>min(max(f(a,b),least),most);
const pmin=(a,b)=>b<a?b:a,pmax=(a,b)=>a<b?b:a;
const and=(a,b)=>a&b,andNot=(a,b)=>a&~b,or=(a,b)=>a|b,xor=(a,b)=>a^b,not=a=>~a,isSet=a=>a!==0;
const eq=(a,b)=>-(a===b),ne=(a,b)=>-(a!==b),lt=(a,b)=>-(a<b),gt=(a,b)=>-(a>b),le=(a,b)=>-(a<=b),ge=(a,b)=>-(a>=b);
const ltU=(a,b)=>-(a>>>0<b>>>0),gtU=(a,b)=>ltU(b,a),leU=(a,b)=>~ltU(b,a),geU=(a,b)=>~ltU(a,b);
const long=f=>(a,b)=>BigInt(f(a,b)),eqL=long(eq),neL=long(ne),ltL=long(lt),gtL=long(gt),leL=long(le),geL=long(ge);
const shl=(a,b)=>a<<b,shrS=(a,b)=>a>>b,shrU=(a,b)=>a>>>b,shrUL=(a,b)=>u(a)>>b;
const signed=a=>BigInt(a),unsigned=a=>BigInt(a>>>0);

const xw=new Int32Array(4),xd=new Float64Array(xw.buffer),xl=new BigInt64Array(xw.buffer),xb=new Uint8Array(xw.buffer),xB=new Int8Array(xw.buffer),xh=new Int16Array(xw.buffer),xH=new Uint16Array(xw.buffer),xW=new Uint32Array(xw.buffer);
const yw=new Int32Array(4),yd=new Float64Array(yw.buffer),yl=new BigInt64Array(yw.buffer),yb=new Uint8Array(yw.buffer),yB=new Int8Array(yw.buffer),yh=new Int16Array(yw.buffer),yH=new Uint16Array(yw.buffer),yW=new Uint32Array(yw.buffer);
const inX=v=>{xw[0]=v[0];xw[1]=v[1];xw[2]=v[2];xw[3]=v[3]},inY=v=>{yw[0]=v[0];yw[1]=v[1];yw[2]=v[2];yw[3]=v[3]};
const ofX=()=>[xw[0],xw[1],xw[2],xw[3]];
const bytesOf=v=>(inX(v),xb),halvesOf=v=>(inX(v),xh),longsOf=v=>(inX(v),xl),doublesOf=v=>(inX(v),xd);
const withByte=(v,n,a)=>{inX(v);xb[n]=a;return ofX()},withHalf=(v,n,a)=>{inX(v);xh[n]=a;return ofX()},withWord=(v,n,a)=>{inX(v);xw[n]=a;return ofX()};
const withLong=(v,n,a)=>{inX(v);xl[n]=a;return ofX()},withDouble=(v,n,a)=>{inX(v);xd[n]=a;return ofX()};
const splat8=a=>{xb.fill(a);return ofX()},splat16=a=>{xh.fill(a);return ofX()},splat32=a=>[a,a,a,a];
const splat64=a=>{xl[0]=xl[1]=a;return ofX()},splatDouble=a=>{xd[0]=xd[1]=a;return ofX()};
const w1=(v,f)=>[f(v[0])|0,f(v[1])|0,f(v[2])|0,f(v[3])|0];
const w2=(v,w,f)=>[f(v[0],w[0])|0,f(v[1],w[1])|0,f(v[2],w[2])|0,f(v[3],w[3])|0];
const ws=(v,n,f)=>[f(v[0],n)|0,f(v[1],n)|0,f(v[2],n)|0,f(v[3],n)|0];
const m1=(v,X,f)=>{inX(v);for(let i=0;i<X.length;i++)X[i]=f(X[i]);return ofX()};
const m2=(v,w,X,Y,f)=>{inX(v);inY(w);for(let i=0;i<X.length;i++)X[i]=f(X[i],Y[i]);return ofX()};
const ms=(v,n,X,f)=>{const b=n&X.BYTES_PER_ELEMENT*8-1;inX(v);for(let i=0;i<X.length;i++)X[i]=f(X[i],b);return ofX()};
const stretch=(v,X,half,Z)=>{inX(v);Z.set(X.slice(half*Z.length,(half+1)*Z.length));return ofX()};
const narrow=(v,w,X,Y,Z,least,most)=>{inX(v);inY(w);Z.set([...X,...Y].map(a=>min(max(a,least),most)));return ofX()};
const pairs=(v,X,Z)=>{inX(v);Z.set(Array.from(Z,(_,i)=>X[2*i]+X[2*i+1]));return ofX()};
const dot=(v,w)=>{inX(v);inY(w);return[0,2,4,6].map(i=>xh[i]*yh[i]+xh[i+1]*yh[i+1]|0)};
const l1=(v,f)=>{inX(v);xl[0]=f(xl[0]);xl[1]=f(xl[1]);return ofX()};
const l2=(v,w,f)=>{inX(v);inY(w);xl[0]=f(xl[0],yl[0]);xl[1]=f(xl[1],yl[1]);return ofX()};
const ls=(v,n,f)=>{const b=BigInt(n&63);inX(v);xl[0]=f(xl[0],b);xl[1]=f(xl[1],b);return ofX()};
const d1=(v,f)=>{inX(v);xd[0]=f(xd[0]);xd[1]=f(xd[1]);return ofX()};
const d2=(v,w,f)=>{inX(v);inY(w);xd[0]=f(xd[0],yd[0]);xd[1]=f(xd[1],yd[1]);return ofX()};
const dc=(v,w,f)=>{inX(v);inY(w);const a=f(xd[0],yd[0])|0,b=f(xd[1],yd[1])|0;return[a,a,b,b]};
const select=(v,w,m)=>[0,1,2,3].map(i=>v[i]&m[i]|w[i]&~m[i]);
const shuffle=(v,w,from)=>{inX(v);inY(w);const b=from.map(i=>i<16?xb[i]:yb[i-16]);xb.set(b);return ofX()};
const swizzle=(v,w)=>{inX(v);inY(w);const b=Array.from(yb,i=>i<16?xb[i]:0);xb.set(b);return ofX()};
const widen=(v,from,f)=>{xl[0]=f(v[from]);xl[1]=f(v[from+1]);return ofX()};
const toWhole=(v,least,most)=>{inX(v);return[cut(xd[0],least,most)|0,cut(xd[1],least,most)|0,0,0]};
const toDouble=(a,b)=>{xd[0]=a;xd[1]=b;return ofX()};
const every=(v,X)=>(inX(v),X.every(isSet)?1:0),allLong=v=>v[0]|v[1]&&v[2]|v[3]?1:0;
const signs=(v,X)=>(inX(v),X.reduce((bits,a,i)=>bits|(a<0)<<i,0)),signsLong=v=>v[1]>>>31|v[3]>>>31<<1;

const load=a=>a&3?[D.getInt32(a,true),D.getInt32(a+4,true),D.getInt32(a+8,true),D.getInt32(a+12,true)]:[I32[a>>>=2],I32[a+1],I32[a+2],I32[a+3]];
const loadHalf=a=>[D.getInt32(a,true),D.getInt32(a+4,true),0,0];
const store=(a,v)=>{for(let i=0;i<4;i++)D.setInt32(a+4*i,v[i],true)};
const fill=(to,value,count)=>{U8.fill(value,to>>>0,(to>>>0)+(count>>>0))};
const copy=(to,from,count)=>{U8.copyWithin(to>>>0,from>>>0,(from>>>0)+(count>>>0))};
`;
