// Messages of the Jupyter wire protocol, version 5.3: signed JSON parts after a delimiter.
// Pure functions; the sockets are in kernel.ts.

import { createHmac } from "node:crypto";

/** A message from the kernel; `parentId` is the id of the request it answers. */
export interface Message {
  readonly type: string;
  readonly parentId: string | undefined;
  readonly content: Readonly<Record<string, unknown>>;
}

/** A request to the kernel. */
export interface Request {
  readonly id: string;
  readonly session: string;
  readonly type: string;
  readonly content: object;
}

const delimiter = "<IDS|MSG>";

/** The frames of `request`, signed with `key`. */
export function encode({ request, key }: { request: Request; key: string }): string[] {
  const header = {
    msg_id: request.id,
    msg_type: request.type,
    session: request.session,
    username: "resinwright",
    date: new Date().toISOString(),
    version: "5.3",
  };
  const parts = [header, {}, {}, request.content].map((part) => JSON.stringify(part));
  return [delimiter, signature(parts, key), ...parts];
}

/**
 * The message in `frames`.
 * @throws Error if the delimiter is missing or the signature is not made with `key`.
 */
export function decode({ frames, key }: { frames: readonly Uint8Array[]; key: string }): Message {
  const text = frames.map((frame) => Buffer.from(frame).toString());
  const start = text.indexOf(delimiter);
  if (start === -1) throw new Error("a message from the kernel has no delimiter");
  const [signed, ...parts] = text.slice(start + 1);
  if (signed !== signature(parts, key)) throw new Error("a message from the kernel has a wrong signature");
  const [header, parent, , content] = parts.map((part) => JSON.parse(part) as Record<string, unknown>);
  return {
    type: String(header?.["msg_type"]),
    parentId: parent?.["msg_id"] as string | undefined,
    content: content ?? {},
  };
}

function signature(parts: readonly string[], key: string): string {
  const hmac = createHmac("sha256", key);
  for (const part of parts) hmac.update(part);
  return hmac.digest("hex");
}
