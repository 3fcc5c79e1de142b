import { listenOnLoopback, serveUntilStopped } from "../process/lifetime";
import { portOf, readOptions } from "../process/options";
import { providerKeys } from "./keys";
import { readPeople } from "./people";
import { createSignInServer } from "./server";

const options = readOptions([
  "port",
  "data",
  "people",
  "client-id",
  "redirect-uris",
  "post-logout-redirect-uris",
]);
const clientSecret = process.env["OIDC_CLIENT_SECRET"];
if (!clientSecret) throw new Error("The sign-in fake needs OIDC_CLIENT_SECRET in its environment.");

const port = portOf(options.port);
const server = createSignInServer({
  issuer: `http://127.0.0.1:${port}`,
  clientId: options["client-id"],
  clientSecret,
  redirectUris: options["redirect-uris"].split(" "),
  postLogoutRedirectUris: options["post-logout-redirect-uris"].split(" "),
  people: readPeople(options.people),
  keys: providerKeys(options.data),
});
await listenOnLoopback(server, port);
serveUntilStopped(async () => {
  server.closeAllConnections();
  await new Promise((resolve) => server.close(resolve));
});
