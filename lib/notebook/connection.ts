// Where a kernel listens: a folder nobody else may enter, or ports of this machine where there are no local sockets.
// The kernel is told by a connection file; the key in it signs every message.

import { randomUUID } from "node:crypto";
import { createServer, type AddressInfo, type Server } from "node:net";
import path from "node:path";

/** Where a kernel listens: the content of its connection file. */
export interface Connection {
  readonly transport: "ipc" | "tcp";
  readonly ip: string;
  readonly shell_port: number;
  readonly iopub_port: number;
  readonly stdin_port: number;
  readonly control_port: number;
  readonly hb_port: number;
  readonly key: string;
  readonly signature_scheme: "hmac-sha256";
}

/** Addresses for a new kernel; with `ipc` they are files in `folder`, with `tcp` ports that are free now. */
export async function newConnection(given: {
  readonly transport: Connection["transport"];
  readonly folder: string;
}): Promise<Connection> {
  const { transport, folder } = given;
  const [shell_port, iopub_port, stdin_port, control_port, hb_port] =
    transport === "tcp" ? await freePorts() : ([1, 2, 3, 4, 5] as const);
  return {
    transport,
    ip: transport === "tcp" ? "127.0.0.1" : path.join(folder, "socket"),
    shell_port,
    iopub_port,
    stdin_port,
    control_port,
    hb_port,
    key: randomUUID(),
    signature_scheme: "hmac-sha256",
  };
}

// All five are held at once, so that they differ, and let go together just before the kernel takes them.
async function freePorts(): Promise<readonly [number, number, number, number, number]> {
  const servers = await Promise.all(Array.from({ length: 5 }, listenAnywhere));
  const ports = servers.map((server) => (server.address() as AddressInfo).port);
  await Promise.all(servers.map((server) => new Promise((resolve) => server.close(resolve))));
  return ports as [number, number, number, number, number];
}

function listenAnywhere(): Promise<Server> {
  return new Promise((resolve, reject) => {
    const server = createServer().on("error", reject);
    server.listen(0, "127.0.0.1", () => resolve(server));
  });
}
