// The sockets between this process and a kernel: two to ask on, one to listen on.
// ZeroMQ is the copy that comes with the kernel, so that both ends are the same build and nothing is compiled.

import { createRequire } from "node:module";
import path from "node:path";
import { InputError } from "../door.js";
import type { Connection } from "./connection.js";
import { decode, encode, type Message, type Request } from "./wire.js";

/** `shell` runs cells, `control` is heard even while a cell runs, `iopub` carries what cells show. */
export type Channel = "shell" | "control" | "iopub";

/** The open sockets to one kernel. */
export interface Sockets {
  send(channel: "shell" | "control", request: Request): void;
  close(): void;
}

interface Socket extends AsyncIterable<Uint8Array[]> {
  connect(address: string): void;
  subscribe(): void;
  send(frames: readonly string[]): Promise<void>;
  close(): void;
}

type SocketType = new (options: { linger: number }) => Socket;

/** The folder of the installed kernel package. */
export function kernelPackage(): string {
  try {
    return path.dirname(createRequire(import.meta.url).resolve("tslab/package.json"));
  } catch {
    throw new InputError(
      "notebook kernel: the package tslab is not installed; run npm install in the workbench",
    );
  }
}

/** Opens the sockets to the kernel at `connection`; `onMessage` gets every message, `onError` what could not be read. */
export function openSockets(given: {
  readonly connection: Connection;
  readonly onMessage: (channel: Channel, message: Message) => void;
  readonly onError: (error: Error) => void;
}): Sockets {
  const { connection, onMessage, onError } = given;
  const { Dealer, Subscriber } = createRequire(path.join(kernelPackage(), "package.json"))("zeromq") as {
    Dealer: SocketType;
    Subscriber: SocketType;
  };
  const options = { linger: 0 };
  const sockets = {
    shell: new Dealer(options),
    control: new Dealer(options),
    iopub: new Subscriber(options),
  };
  for (const channel of ["shell", "control", "iopub"] as const) {
    const { transport, ip, [`${channel}_port` as const]: port } = connection;
    sockets[channel].connect(`${transport}://${ip}:${port}`);
    listen(channel, sockets[channel]).catch(onError);
  }
  sockets.iopub.subscribe();

  async function listen(channel: Channel, socket: Socket): Promise<void> {
    for await (const frames of socket) onMessage(channel, decode({ frames, key: connection.key }));
  }

  return {
    // A request that cannot be sent has no reply, which the waiting side notices by its time limit.
    send: (channel, request) => {
      sockets[channel].send(encode({ request, key: connection.key })).catch(() => undefined);
    },
    close: () => {
      for (const socket of Object.values(sockets)) socket.close();
    },
  };
}
