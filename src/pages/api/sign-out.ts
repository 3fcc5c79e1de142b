import { signOut } from "~/server/auth/account";
import { endpoint } from "~/server/http/endpoint";
import { seeOther } from "~/server/http/respond";

export const POST = endpoint(
  { action: "session.end", summary: "Ends this browser's session.", responses: { 303: "empty" } },
  async ({ principal, context }) => {
    const { sessionId } = context.locals;
    if (principal.kind === "member" && sessionId !== null)
      await signOut(principal, sessionId, context.cookies);
    return seeOther("/");
  },
);
