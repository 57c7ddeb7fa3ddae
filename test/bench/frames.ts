// Messages with a `Content-Length` head, as both servers write them. Both are spoken to in the same plain way, so that no client's library
// counts in their times.

import type { Readable, Writable } from "node:stream";

export function readFrames<Message>(stream: Readable, hear: (message: Message) => void): void {
  let rest: Buffer = Buffer.alloc(0);
  stream.on("data", (chunk: Buffer) => {
    rest = rest.length === 0 ? chunk : Buffer.concat([rest, chunk]);
    for (;;) {
      const headEnd = rest.indexOf("\r\n\r\n");
      if (headEnd < 0) return;
      const length = Number(/Content-Length: (\d+)/.exec(rest.toString("latin1", 0, headEnd))?.[1]);
      const end = headEnd + 4 + length;
      if (rest.length < end) return;
      const message: Message = JSON.parse(rest.toString("utf8", headEnd + 4, end));
      rest = rest.subarray(end);
      hear(message);
    }
  });
}

export function writeFrame(stream: Writable, message: object): void {
  const body = JSON.stringify(message);
  stream.write(`Content-Length: ${Buffer.byteLength(body)}\r\n\r\n${body}`);
}
