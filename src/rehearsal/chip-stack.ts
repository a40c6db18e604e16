/**
 * The deepest stack of a compiled sketch: the compiler's own figure for each function (-fstack-usage, the return address included), summed
 * along the deepest way through the calls that the disassembly shows, and the deepest interrupt on top of it.
 *
 * An interrupt of an AVR chip shuts out the others (data sheet, Reset and Interrupt Handling), unless its code lets them in (`sei`): then
 * all of them are taken to lie on top of each other. What is called by address is taken to be any function that nothing calls by name. What
 * the compiler has no figure for is assembly of its library: there pushes are counted, and a ring of calls is taken for what it is there, a
 * function that drops its return address and goes on in another.
 */

export interface StackUse {
  /** Deepest, interrupts included, bytes. */
  deepestBytes: number;
  /** Of that, the interrupts' share, bytes. */
  interruptBytes: number;
  /** The functions on the deepest way from main(), and of the deepest interrupt. */
  chain: readonly string[];
  interruptChain: readonly string[];
}

interface Code {
  name: string;
  ownBytes: number;
  /** By the compiler, not of its library. */
  compiled: boolean;
  calls: readonly number[];
  /** Out of the function: what has been called returns for it, so that a ring of jumps takes no stack. */
  jumps: readonly number[];
  indirect: boolean;
  lets: boolean;
}

interface Deepest {
  bytes: number;
  chain: readonly string[];
}

/** A function's name without namespaces, parameters and what the compiler appends to its clones. */
function plainName(name: string): string {
  const plain = name
    .replace(/\(anonymous namespace\)::/g, '')
    .replace(/[(.[].*$/, '')
    .trim();
  return plain.slice(plain.lastIndexOf('::') + 1).replace(/^:/, '');
}

/** The compiler's figures by plain name; of several alike the largest. */
function figures(stackUsage: string): Map<string, number> {
  const found = new Map<string, number>();
  for (const line of stackUsage.split('\n')) {
    const [, name, bytes, kind] = /^[^\t]*:\d+:\d+:([^\t]+)\t(\d+)\t(\S+)/.exec(line) ?? [];
    if (name === undefined || bytes === undefined) continue;
    if (kind !== 'static') throw new Error(`The stack of ${name} has no bound: ${kind}.`);
    const plain = plainName(name);
    found.set(plain, Math.max(found.get(plain) ?? 0, Number(bytes)));
  }
  return found;
}

/** The functions of a disassembly (avr-objdump -dC) by address. */
function codeOf(listing: string, stackUsage: string, returnBytes: number): Map<number, Code> {
  const known = figures(stackUsage);
  const functions = [...listing.matchAll(/^([0-9a-f]+) <(.+)>:\n((?:.+\n)*)/gm)].map(
    ([, at, name, body]) => ({
      start: parseInt(at!, 16),
      name: name!,
      body: body!,
    }),
  );
  const starts = functions.map(({ start }) => start);
  return new Map(
    functions.map(({ start, name, body }, i) => {
      const end = starts[i + 1] ?? Infinity;
      const targets = [...body.matchAll(/\s(r?call|r?jmp)\s.*; 0x([0-9a-f]+)/g)].map(([, kind, to]) => ({
        isCall: kind!.endsWith('call'),
        to: parseInt(to!, 16),
      }));
      const pushes = [...body.matchAll(/\spush\s/g)].length + returnBytes;
      const code: Code = {
        name: plainName(name),
        ownBytes: known.get(plainName(name)) ?? pushes,
        compiled: known.has(plainName(name)),
        calls: targets.filter(({ isCall }) => isCall).map(({ to }) => to),
        // one to address 0 is a reset
        jumps: targets
          .filter(({ isCall, to }) => !isCall && to > 0 && (to < start || to >= end))
          .map(({ to }) => to),
        indirect: /\se?icall\b/.test(body),
        lets: /\ssei\b/.test(body),
      };
      return [start, code];
    }),
  );
}

/** The deepest way down from a function. */
class Descent {
  private readonly done = new Map<number, Deepest>();
  private readonly open = new Set<number>();

  constructor(
    private readonly code: ReadonlyMap<number, Code>,
    private readonly byAddress: readonly number[],
  ) {}

  from(start: number): Deepest {
    const known = this.done.get(start);
    if (known !== undefined) return known;
    const code = this.code.get(start);
    // a jump to the middle of a function is one into a shared ending, which takes nothing off the stack's top
    if (code === undefined) return { bytes: 0, chain: [] };
    if (this.open.has(start) && !code.compiled) return { bytes: 0, chain: [] };
    if (this.open.has(start)) throw new Error(`${code.name} calls itself: its stack has no bound.`);
    this.open.add(start);
    let deepest: Deepest = { bytes: 0, chain: [] };
    const others = [...code.jumps, ...(code.indirect ? this.byAddress : [])];
    for (const to of [...code.calls, ...others.filter((each) => !this.open.has(each))]) {
      const below = this.from(to);
      if (below.bytes > deepest.bytes) deepest = below;
    }
    this.open.delete(start);
    const found = { bytes: code.ownBytes + deepest.bytes, chain: [code.name, ...deepest.chain] };
    this.done.set(start, found);
    return found;
  }
}

/**
 * @param listing of `avr-objdump -dC`
 * @param stackUsage the `.su` files of the link, one after the other
 * @param returnBytes bytes of a return address: 2, or 3 on chips with more than 128 KiB of flash
 * @throws Error where there is no bound, or no main()
 */
export function deepestStack(listing: string, stackUsage: string, returnBytes: number): StackUse {
  const code = codeOf(listing, stackUsage, returnBytes);
  const called = new Set([...code.values()].flatMap(({ calls, jumps }) => [...calls, ...jumps]));
  const find = (test: (code: Code) => boolean) =>
    [...code].filter(([, each]) => test(each)).map(([at]) => at);
  const isVector = ({ name }: Code) => /^__vector_\d+$/.test(name);
  const [main] = find(({ name }) => name === 'main');
  if (main === undefined) throw new Error('The sketch has no main().');
  const byAddress = find((each) => !isVector(each) && !each.name.startsWith('__')).filter(
    (at) => !called.has(at),
  );
  const descent = new Descent(code, byAddress);
  const vectors = find(isVector).map((at) => ({ ...descent.from(at), lets: code.get(at)!.lets }));
  const worst = vectors.toSorted((a, b) => b.bytes - a.bytes)[0] ?? { bytes: 0, chain: [] };
  const interruptBytes = vectors.some(({ lets }) => lets)
    ? vectors.reduce((sum, { bytes }) => sum + bytes, 0)
    : worst.bytes;
  const { bytes, chain } = descent.from(main);
  return { deepestBytes: bytes + interruptBytes, interruptBytes, chain, interruptChain: worst.chain };
}
