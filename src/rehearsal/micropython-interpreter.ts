/**
 * The real MicroPython interpreter, as its makers compile it to WebAssembly, with files of ours in it.
 *
 * Every use gets a fresh interpreter: nothing of an earlier run can be left in it, and loading one takes about 10 ms.
 * The package keeps its side of the bridge between the languages in global variables, so that only the interpreter
 * loaded last is whole: uses within one thread therefore wait for each other, and each use is synchronous.
 *
 * Objects have 32 bits as on the boards, so integers leave the machine word and take heap at 2^30 there and here.
 */
import { loadMicroPython } from '@micropython/micropython-webassembly-pyscript';

/** Source text of one module or script. */
export interface PythonFile {
  /** Path below the folder that holds the program, e.g. "main.py". */
  path: string;
  text: string;
}

/** An exception that left the program. */
export class PythonFailure extends Error {
  override readonly name = 'PythonFailure';

  /**
   * @param type name of the exception, e.g. "ValueError"
   * @param traceback the text that the board would print, traceback included
   */
  constructor(
    readonly type: string,
    readonly traceback: string,
  ) {
    super(traceback.trim().split('\n').at(-1) ?? type);
  }
}

/** Heap of a small board, bytes; the interpreter adds to it when a program needs more. */
const HEAP_BYTES = 128 * 1024;
/** Lines of output that are kept: the first ones, with which a fault begins. */
const OUTPUT_LINES = 1000;

export class Interpreter {
  constructor(
    private readonly python: Awaited<ReturnType<typeof loadMicroPython>>,
    /** Lines that the program has printed, at most the first 1000. */
    readonly output: readonly string[],
  ) {}

  /** Puts files into a folder of the interpreter's own file system. */
  writeFiles(folder: string, files: readonly PythonFile[]): void {
    for (const file of files) {
      const path = `${folder}/${file.path}`;
      this.python.FS.mkdirTree(path.slice(0, path.lastIndexOf('/')));
      this.python.FS.writeFile(path, file.text);
    }
  }

  /** Makes an object's functions importable as a module; integers, booleans and text pass unchanged. */
  registerModule(name: string, functions: object): void {
    this.python.registerJsModule(name, functions);
  }

  /**
   * Runs source text to its end.
   *
   * @throws PythonFailure when a Python exception leaves it; what a registered function throws comes through as it
   *   is, past all `except` and `finally`, and leaves the interpreter unusable
   */
  run(source: string): unknown {
    try {
      return this.python.runPython(source);
    } catch (error) {
      if (error instanceof Error && error.name === 'PythonError')
        throw new PythonFailure((error as Error & { type: string }).type, error.message);
      throw error;
    }
  }
}

let queue: Promise<unknown> = Promise.resolve();

/** Loads an interpreter and gives it to `use`, after all earlier uses are over. */
export function withInterpreter<T>(use: (interpreter: Interpreter) => T): Promise<T> {
  const result = queue.then(async () => {
    const output: string[] = [];
    const print = (line: string): void => {
      if (output.length < OUTPUT_LINES) output.push(line);
    };
    const python = await loadMicroPython({
      heapsize: HEAP_BYTES,
      linebuffer: true,
      stdout: print,
      stderr: print,
    });
    return use(new Interpreter(python, output));
  });
  queue = result.catch(() => undefined);
  return result;
}
