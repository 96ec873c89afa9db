/** The rest of Office.js that the pane uses: readiness, sets of the interface, the workbook as a file. */
import { writeFile } from "./file";
import { Program, USUAL, type Behaviour } from "./excel";
import { Book } from "./book";

export { Book } from "./book";
export { Program, USUAL, type Behaviour } from "./excel";

/** The global `Office` of a program. */
export function officeOf(program: Program, theme?: string): unknown {
  const { behaviour } = program;
  return {
    onReady: () => Promise.resolve({ host: "Excel", platform: "PC" }),
    HostType: { Excel: "Excel" },
    FileType: { Compressed: "compressed" },
    AsyncResultStatus: { Succeeded: "succeeded" },
    context: {
      ...(theme === undefined ? {} : { officeTheme: { bodyBackgroundColor: theme } }),
      requirements: {
        isSetSupported: (set: string, version: string) =>
          set !== "ExcelApi" || Number(version.split(".")[1]) <= behaviour.newestSet,
      },
      document: {
        getFileAsync: (_: string, { sliceSize }: { sliceSize: number }, done: (result: unknown) => void) => {
          const bytes = writeFile(program.book);
          const count = Math.ceil(bytes.length / sliceSize);
          const file = {
            size: bytes.length,
            sliceCount: count,
            getSliceAsync: (index: number, next: (result: unknown) => void) => {
              const data = [...bytes.subarray(index * sliceSize, (index + 1) * sliceSize)];
              setTimeout(next, 0, { status: "succeeded", value: { data } });
            },
            closeAsync: () => undefined,
          };
          setTimeout(done, 0, { status: "succeeded", value: file });
        },
      },
    },
  };
}

/** Sets the globals of a program with a fresh workbook. */
export function openProgram(
  functions: Book["functions"],
  changes: Partial<Behaviour> = {},
  namespace = "CAP",
): Program {
  const program = new Program(new Book(functions, namespace), { ...USUAL, ...changes });
  Object.assign(globalThis, { Excel: program.excel(), Office: officeOf(program) });
  return program;
}
