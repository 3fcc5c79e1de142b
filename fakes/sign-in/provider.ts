import Provider, { interactionPolicy, type Configuration, type KoaContextWithOIDC } from "oidc-provider";
import type { ProviderKeys } from "./keys";
import type { Person } from "./people";

export interface SignInOptions {
  issuer: string;
  clientId: string;
  clientSecret: string;
  redirectUris: readonly string[];
  postLogoutRedirectUris: readonly string[];
  people: readonly Person[];
  keys: ProviderKeys;
}

const scopes = "openid profile email";

/** OpenID Connect with PKCE for one client; people are chosen from a list instead of giving a password. */
export function createProvider(options: SignInOptions): Provider {
  const configuration: Configuration = {
    clients: [
      {
        client_id: options.clientId,
        client_secret: options.clientSecret,
        redirect_uris: [...options.redirectUris],
        post_logout_redirect_uris: [...options.postLogoutRedirectUris],
        response_types: ["code"],
        grant_types: ["authorization_code"],
        scope: scopes,
        require_auth_time: true,
      },
    ],
    pkce: { required: () => true },
    jwks: options.keys.jwks,
    cookies: { keys: options.keys.cookieKeys },
    claims: { openid: ["sub", "auth_time"], profile: ["name"], email: ["email", "email_verified"] },
    conformIdTokenClaims: false,
    features: { devInteractions: { enabled: false } },
    interactions: {
      policy: choosePersonEachTime(),
      url: (_ctx, interaction) => `/people/${interaction.uid}`,
    },
    ttl: { Session: 12 * 3600, Interaction: 3600, Grant: 12 * 3600, AccessToken: 3600, IdToken: 3600 },
    findAccount: (_ctx, subject) => {
      const person = options.people.find((one) => one.subject === subject);
      if (!person) return undefined;
      const { name, email } = person;
      return { accountId: subject, claims: () => ({ sub: subject, name, email, email_verified: true }) };
    },
    loadExistingGrant: grantEverythingAsked,
    renderError: (ctx, { error, error_description }) => {
      ctx.type = "text/plain; charset=utf-8";
      ctx.body = `Sign-in failed: ${error}${error_description ? ` (${error_description})` : ""}`;
    },
  };
  return new Provider(options.issuer, configuration);
}

/**
 * A person with a session may still want to be somebody else here, so the list is shown at every sign-in
 * that does not ask for silence (`prompt=none`). `prompt=login` and `max_age` work as everywhere.
 */
function choosePersonEachTime() {
  const policy = interactionPolicy.base();
  const { Check } = interactionPolicy;
  policy
    .get("login")
    ?.checks.add(
      new Check("choose_person", "A person has to be chosen", ({ oidc }: KoaContextWithOIDC) =>
        oidc.result?.login || oidc.prompts.has("none") ? Check.NO_NEED_TO_PROMPT : Check.REQUEST_PROMPT,
      ),
    );
  return policy;
}

/** The one client is the organisation's own, so nobody is asked for consent. */
async function grantEverythingAsked({ oidc }: KoaContextWithOIDC) {
  const { client, session, provider } = oidc;
  if (!client || !session?.accountId) return undefined;
  const grant = new provider.Grant({ clientId: client.clientId, accountId: session.accountId });
  grant.addOIDCScope(scopes);
  await grant.save();
  return grant;
}
