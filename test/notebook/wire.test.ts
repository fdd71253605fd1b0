import { createHmac } from "node:crypto";
import { describe, expect, it } from "vitest";
import { decode, encode } from "../../lib/notebook/wire.js";

const request = { id: "r1", session: "s1", type: "execute_request", content: { code: "1" } };
const frames = encode({ request, key: "secret" });
const received = (texts: readonly string[]) => texts.map((text) => Buffer.from(text));

describe("the wire protocol", () => {
  it("signs the four parts after the delimiter", () => {
    const [delimiter, signature, header, parent, metadata, content] = frames;
    expect(delimiter).toBe("<IDS|MSG>");
    expect(JSON.parse(header!)).toMatchObject({
      msg_id: "r1",
      msg_type: "execute_request",
      session: "s1",
      version: "5.3",
    });
    expect([parent, metadata, content]).toEqual(["{}", "{}", `{"code":"1"}`]);
    expect(signature).toBe(
      createHmac("sha256", "secret").update([header, parent, metadata, content].join("")).digest("hex"),
    );
  });

  it("reads what it wrote, after any routing frames", () => {
    const message = decode({ frames: received(["route", ...frames]), key: "secret" });
    expect(message).toEqual({ type: "execute_request", parentId: undefined, content: { code: "1" } });
  });

  it("refuses what is not signed with the key, or has no delimiter", () => {
    expect(() => decode({ frames: received(frames), key: "other" })).toThrow(
      "a message from the kernel has a wrong signature",
    );
    const changed = [...frames.slice(0, -1), `{"code":"2"}`];
    expect(() => decode({ frames: received(changed), key: "secret" })).toThrow("wrong signature");
    expect(() => decode({ frames: received(frames.slice(1)), key: "secret" })).toThrow(
      "a message from the kernel has no delimiter",
    );
  });
});
