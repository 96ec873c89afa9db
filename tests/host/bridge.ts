/**
 * The spreadsheet program's end of the maker's native bridge: converts arguments as the program does, asks the runtime,
 * and shows its answers as cells. It needs nothing but timers, so it runs beside the runtime in a page as well.
 */

/** How the host passes an empty cell: 0 on the desktop, null on the web. */
export type EmptyCell = 0 | null;

export interface HostError {
  readonly error: string;
  readonly message?: string;
}

export type HostCell = number | string | boolean | HostError;

interface Parameter {
  readonly name: string;
  readonly type?: string;
  readonly dimensionality?: string;
  readonly optional?: boolean;
}

export interface Metadata {
  readonly functions: readonly {
    readonly id: string;
    readonly parameters: readonly Parameter[];
    readonly options?: Readonly<Record<string, unknown>>;
  }[];
}

/** Error numbers of the bridge's failure messages. */
const FAILURES: Readonly<Record<number, string>> = {
  0: "#VALUE!",
  1: "#N/A",
  2: "#VALUE!",
  3: "#VALUE!",
  5: "#DIV/0!",
  6: "#NUM!",
  7: "#VALUE!",
  8: "#NULL!",
};

const CALL_REQUEST = { type: 3, category: 1, messageType: 1000 };

/** A call that takes longer would show as busy for ever. */
const LONGEST_WAIT_MS = 30_000;

type Settle = (result: { value?: unknown; failed?: boolean; code?: number }) => void;

/** What the runtime talks through; it sets `onMessageFromHost` itself. */
export interface Channel {
  sendMessageToHost(text: string): void;
  onMessageFromHost?: (text: string) => void;
}

export class HostBridge {
  private readonly pending = new Map<number, Settle>();
  private nextId = 1;
  readonly channel: Channel = { sendMessageToHost: (text) => this.receive(text) };

  constructor(
    private readonly metadata: Metadata,
    private readonly empty: EmptyCell,
  ) {}

  private receive(text: string): void {
    const message = JSON.parse(text);
    for (const action of message.message?.body?.Actions ?? []) {
      if (action.Name !== "SetInvocationArrayResults") continue;
      for (const [id, ok, value, code] of action.ArgumentInfo.Arguments[0]) {
        this.pending.get(id)?.(ok ? { value } : { failed: true, value, code });
      }
    }
    if (message.type !== 1) return;
    const answer = {
      id: message.id,
      type: 2,
      message: {
        statusCode: 200,
        headers: {},
        body: {
          Results: (message.message.body.Actions ?? []).map((action: any) => ({ ActionId: action.Id, Value: null })),
        },
      },
    };
    setTimeout(() => this.channel.onMessageFromHost?.(JSON.stringify(answer)), 0);
  }

  private passed(parameter: Parameter, argument: unknown): unknown {
    if (argument === undefined) return null;
    const cell = (value: unknown): unknown => (value === null ? this.empty : value);
    if (parameter.dimensionality !== "matrix") throw new Error(`${parameter.name} is not declared as a range`);
    const range = Array.isArray(argument) ? (argument as unknown[][]) : [[argument]];
    return range.map((row) => row.map(cell));
  }

  /** Calls a function by id; a scalar result comes as a 1x1 spill, as the functions declare it. */
  async call(id: string, args: readonly unknown[]): Promise<HostCell[][]> {
    const entry = this.metadata.functions.find((candidate) => candidate.id === id);
    if (!entry) return [[{ error: "#NAME?" }]];
    const required = entry.parameters.filter((parameter) => !parameter.optional).length;
    if (args.length < required || args.length > entry.parameters.length) {
      throw new Error(`the spreadsheet refuses ${id} with ${args.length} arguments`);
    }
    const passed = entry.parameters.map((parameter, i) => this.passed(parameter, args[i]));
    const invocation = this.nextId++;
    const settled = new Promise<Parameters<Settle>[0]>((resolve) => {
      const late = setTimeout(() => resolve({ failed: true, value: `${id} never answers` }), LONGEST_WAIT_MS);
      this.pending.set(invocation, (result) => {
        clearTimeout(late);
        resolve(result);
      });
    });
    // The bridge is text: NaN and infinities become null on the way, as in the host.
    const request = JSON.stringify([invocation, id, passed, null, 0]);
    const { type, category, messageType } = CALL_REQUEST;
    this.channel.onMessageFromHost?.(
      JSON.stringify({
        type,
        message: { entries: [{ messageCategory: category, messageType, targetId: "", message: request }] },
      }),
    );
    const result = await settled;
    this.pending.delete(invocation);
    if (result.failed) return [[{ error: FAILURES[result.code ?? 0] ?? "#VALUE!", message: String(result.value) }]];
    return shown(result.value);
  }
}

/** A returned value as cells: null shows as 0, an error object as its code. */
function shown(value: unknown): HostCell[][] {
  const cell = (content: any): HostCell => {
    if (content === null || content === undefined) return 0;
    if (content?.type === "Error") return { error: content.basicValue, message: content.message };
    return content;
  };
  if (!Array.isArray(value)) return [[cell(value)]];
  const width = (value[0] as unknown[] | undefined)?.length ?? 0;
  if (width === 0 || value.some((row: unknown[]) => row.length !== width)) {
    return [[{ error: "#VALUE!", message: "ragged or empty array" }]];
  }
  return value.map((row: unknown[]) => row.map(cell));
}
