// A kernel of our own: started in a notebook's folder, given one cell after another, and always stopped.
// It notices what the kernel itself calls a success: errors outside a cell's own run, and work left running.

import { spawn, type ChildProcess } from "node:child_process";
import { randomUUID } from "node:crypto";
import { mkdtempSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import path from "node:path";
import { stripVTControlCharacters } from "node:util";
import { beforeExit } from "./cleanup.js";
import { newConnection, type Connection } from "./connection.js";
import type { Output } from "./notebookFile.js";
import { kernelPackage, openSockets, type Channel } from "./sockets.js";
import type { Message } from "./wire.js";

/** How a cell stands; `aborted` is the kernel's word for a cell it did not run after an error in the one before. */
export type CellStatus = "ok" | "error" | "aborted" | "too long" | "kernel ended";

/** What a cell showed, and what it wrote to the error stream; both may still grow after it ended. */
interface CellRecord {
  readonly outputs: Output[];
  errorText: string;
}

/** One run of one cell. */
export interface CellRun extends Readonly<CellRecord> {
  readonly status: CellStatus;
}

/** How a kernel ended: when it was asked to, before that, or only when it was killed; and what was written to its error stream outside any cell. */
export interface Ending {
  readonly ended: "when asked" | "before" | "killed";
  readonly exitCode: number | null;
  readonly errorText: string;
}

/** A running kernel. */
export interface Kernel {
  /** Runs `code` and waits until it ended; one still running after `timeLimit_s` is killed with its kernel. */
  execute(cell: { code: string; timeLimit_s: number }): Promise<CellRun>;
  /** Waits until nothing was heard for `pause_ms`, or at most ten times as long. */
  quiet(wait: { pause_ms: number }): Promise<void>;
  /** Asks the kernel to end and kills it if it does not; the temporary folder goes with it. */
  stop(): Promise<Ending>;
}

const startLimit_ms = 60_000;
const retry_ms = 200;
// An idle kernel ends within 0.1 s of being asked; one with a timer, a server or a child process does not.
const stopLimit_ms = 3_000;

/**
 * Starts a kernel with `folder` as its working directory; `environment` is added to that of this process.
 * @throws Error with the kernel's own words if it ends before it answers, or does not answer within a minute.
 */
export async function startKernel(given: {
  readonly folder: string;
  readonly environment: Readonly<Record<string, string>>;
  readonly transport?: Connection["transport"];
}): Promise<Kernel> {
  const { folder, environment } = given;
  const program = path.join(kernelPackage(), "bin", "tslab");
  const privateFolder = mkdtempSync(path.join(tmpdir(), "notebook-kernel-"));
  const transport = given.transport ?? (localSocketsFit(privateFolder) ? "ipc" : "tcp");
  const connectionFile = path.join(privateFolder, "connection.json");
  const connection = await newConnection({ transport, folder: privateFolder });
  writeFileSync(connectionFile, JSON.stringify(connection), { mode: 0o600 });
  const child = spawn(process.execPath, [...errorTap, program, "kernel", `--config-path=${connectionFile}`], {
    cwd: folder,
    env: { ...process.env, ...environment },
    stdio: ["ignore", "ignore", "pipe"],
  });
  const clear = () => {
    child.kill("SIGKILL");
    rmSync(privateFolder, { recursive: true, force: true });
  };
  const forget = beforeExit(clear);
  const done = () => {
    forget();
    clear();
  };
  let kernel: Conversation | undefined;
  try {
    kernel = converse(child, connection, done);
    await kernel.ready();
    return kernel;
  } catch (error) {
    await kernel?.stop();
    done();
    throw error;
  }
}

// Local sockets need no free port and nobody else can reach them; some systems have none, and their paths are short.
function localSocketsFit(folder: string): boolean {
  return process.platform !== "win32" && folder.length < 90;
}

// The kernel reports an unhandled error through its sockets, which are closed when it ends: here it is written out as well.
const errorTap = [
  "--import",
  `data:text/javascript,${encodeURIComponent(`
    import { writeSync } from "node:fs";
    import { inspect } from "node:util";
    const write = (what) => (reason) => writeSync(2, what + ": " + inspect(reason) + "\\n");
    process.on("uncaughtExceptionMonitor", write("uncaught exception"));
    process.on("unhandledRejection", write("rejected promise that nothing awaits"));
  `)}`,
];

interface Conversation extends Kernel {
  ready(): Promise<void>;
}

function converse(child: ChildProcess, connection: Connection, clear: () => void): Conversation {
  const session = randomUUID();
  const records = new Map<string, CellRecord>();
  const replies = new Map<string, Record<string, unknown>>();
  const idle = new Set<string>();
  const listeners = new Set<() => void>();
  let lastHeard = Date.now();
  let errorText = "";
  let gone = false;
  let killed = false;
  let stopping: Promise<Ending> | undefined;
  const heardOn = new Set<Channel>();

  child.stderr?.on("data", (data: Buffer) => (errorText += data.toString()));
  child.on("error", (error) => ended(error.message));
  child.on("close", () => ended());
  const sockets = openSockets({
    connection,
    onMessage: (channel, message) => {
      lastHeard = Date.now();
      heardOn.add(channel);
      const { parentId, content } = message;
      if (channel === "shell" && parentId !== undefined) replies.set(parentId, content);
      if (channel === "iopub") note(message);
      changed();
    },
    onError: (error) => {
      errorText += `${error.message}\n`;
      kill();
    },
  });

  function changed(): void {
    for (const listener of listeners) listener();
  }

  function ended(reason = ""): void {
    errorText += reason;
    gone = true;
    changed();
  }

  function kill(): void {
    killed = true;
    child.kill("SIGKILL");
  }

  /** Waits until `met()` holds, checked on every message; says whether it did within `limit_ms`. */
  function until(met: () => boolean, limit_ms: number): Promise<boolean> {
    return new Promise((resolve) => {
      const finish = (value: boolean) => {
        clearTimeout(timer);
        listeners.delete(check);
        resolve(value);
      };
      const check = () => {
        if (met()) finish(true);
      };
      const timer = setTimeout(() => finish(met()), limit_ms);
      listeners.add(check);
      check();
    });
  }

  function note({ type, parentId, content }: Message): void {
    const record = parentId === undefined ? undefined : records.get(parentId);
    if (type === "status" && content["execution_state"] === "idle" && parentId !== undefined)
      idle.add(parentId);
    if (record === undefined) return;
    if (type === "stream" && content["name"] === "stderr")
      record.errorText += stripVTControlCharacters(String(content["text"]));
    else if (type === "stream") addText(record.outputs, stripVTControlCharacters(String(content["text"])));
    else if (type === "display_data") record.outputs.push(display(content));
    else if (type === "update_display_data") replaceDisplay(records.values(), display(content));
  }

  function request(channel: "shell" | "control", type: string, content: object): string {
    const id = randomUUID();
    sockets.send(channel, { id, session, type, content });
    return id;
  }

  return {
    // A subscription takes effect some time after it is made, so the question is repeated until it is heard on both.
    async ready() {
      for (const start = Date.now(); Date.now() - start < startLimit_ms;) {
        request("shell", "kernel_info_request", {});
        const met = () => gone || (heardOn.has("shell") && heardOn.has("iopub"));
        if ((await until(met, retry_ms)) && !gone) return;
        if (gone) throw new Error(`it ended before it answered\n${errorText}`.trim());
      }
      throw new Error(`it did not answer within ${startLimit_ms / 1000} s\n${errorText}`.trim());
    },

    async execute({ code, timeLimit_s }) {
      const record: CellRecord = { outputs: [], errorText: "" };
      const id = request("shell", "execute_request", {
        code,
        silent: false,
        store_history: true,
        user_expressions: {},
        allow_stdin: false,
        stop_on_error: true,
      });
      records.set(id, record);
      const ended = await until(() => gone || (replies.has(id) && idle.has(id)), timeLimit_s * 1000);
      if (!ended) kill();
      const status = !ended ? "too long" : gone ? "kernel ended" : statusOf(replies.get(id)?.["status"]);
      return Object.assign(record, { status });
    },

    async quiet({ pause_ms }) {
      const latest = Date.now() + 10 * pause_ms;
      lastHeard = Date.now();
      for (let wait = pause_ms; wait > 0 && !gone;) {
        await until(() => gone, wait);
        wait = Math.min(lastHeard + pause_ms, latest) - Date.now();
      }
    },

    stop: () => (stopping ??= stop()),
  };

  async function stop(): Promise<Ending> {
    const before = gone;
    request("control", "shutdown_request", { restart: false });
    if (!(await until(() => gone, killed ? 0 : stopLimit_ms))) kill();
    await until(() => gone, stopLimit_ms);
    sockets.close();
    clear();
    return {
      ended: killed ? "killed" : before ? "before" : "when asked",
      exitCode: child.exitCode,
      errorText: stripVTControlCharacters(errorText),
    };
  }
}

function statusOf(status: unknown): CellStatus {
  return status === "ok" ? "ok" : status === "error" ? "error" : "aborted";
}

interface Display {
  readonly kind: "display";
  readonly data: Record<string, string>;
  readonly id: string | undefined;
}

function display({ data, transient }: Record<string, unknown>): Display {
  const id = (transient as { display_id?: string } | undefined)?.display_id;
  return { kind: "display", data: data as Record<string, string>, id };
}

function replaceDisplay(records: Iterable<CellRecord>, changed: Display): void {
  for (const { outputs } of records) {
    const at = outputs.findIndex((output) => (output as Display).id === changed.id);
    if (at !== -1) outputs[at] = changed;
  }
}

function addText(outputs: Output[], text: string): void {
  const last = outputs.at(-1);
  if (last?.kind === "text") outputs[outputs.length - 1] = { kind: "text", text: last.text + text };
  else outputs.push({ kind: "text", text });
}
