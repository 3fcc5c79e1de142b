import { describe, expect, it } from "vitest";
import { judgeFailure, keptAnswer } from "./failure";

const smtpError = (code: string, responseCode?: number, response?: string) =>
  Object.assign(new Error("refused"), { code, responseCode, response });

describe("judgeFailure", () => {
  it("takes a 5xx answer to the recipient or the message for final", () => {
    expect(judgeFailure(smtpError("EENVELOPE", 550, "550 5.1.1 No such user")).isFinal).toBe(true);
    expect(judgeFailure(smtpError("EMESSAGE", 554)).isFinal).toBe(true);
    expect(judgeFailure(new Error("The Subject of a message has a line break.")).isFinal).toBe(true);
  });

  it("tries again after 4xx, lost connections, failed sign-in and refused TLS", () => {
    expect(judgeFailure(smtpError("EENVELOPE", 451)).isFinal).toBe(false);
    expect(judgeFailure(smtpError("ECONNECTION")).isFinal).toBe(false);
    expect(judgeFailure(smtpError("EAUTH", 535)).isFinal).toBe(false);
    expect(judgeFailure(smtpError("ETLS")).isFinal).toBe(false);
    expect(judgeFailure("lost").isFinal).toBe(false);
  });

  it("keeps the answer without addresses, in one line of at most 500 characters", () => {
    expect(keptAnswer("550 No such mailbox:\r\n <ilka@quillhaven.example> here")).toBe(
      "550 No such mailbox:  <(address)> here",
    );
    expect(keptAnswer(`x${"y".repeat(900)}`)).toHaveLength(500);
  });
});
