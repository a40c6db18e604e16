/** The part of the MicroPython package's interface that is used here; the package brings no types of its own. */
declare module '@micropython/micropython-webassembly-pyscript' {
  interface MicroPythonOptions {
    /** First part of the garbage-collected heap, bytes; the heap grows when it is full. */
    heapsize?: number;
    /** Whether `stdout` gets whole lines as text. */
    linebuffer?: boolean;
    stdout?: (line: string) => void;
    stderr?: (line: string) => void;
  }

  interface MicroPython {
    FS: {
      mkdirTree(path: string): void;
      writeFile(path: string, text: string): void;
    };
    registerJsModule(name: string, module: object): void;
    runPython(source: string): unknown;
  }

  export function loadMicroPython(options?: MicroPythonOptions): Promise<MicroPython>;
}
