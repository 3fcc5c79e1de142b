import { signOutEverywhere } from "~/server/auth/account";
import { endpoint } from "~/server/http/endpoint";
import { seeOther } from "~/server/http/respond";

export const POST = endpoint(
  {
    action: "account.sign-out-everywhere",
    summary: "Ends every session of the person who asks.",
    responses: { 303: "empty" },
  },
  async ({ principal, context }) => {
    await signOutEverywhere(principal, context.cookies);
    return seeOther("/");
  },
);
