/** Somebody who may get a notice, ticked or not. */
export interface Addressee {
  name: string;
  email: string;
  /** What a contact of the site does there; null for somebody who was typed in. */
  duty: string | null;
  chosen: boolean;
}

const key = (email: string) => email.trim().toLowerCase();

/**
 * The site's people to notify, then whoever else the draft names. A draft that names nobody yet starts with all of the
 * site's people ticked.
 */
export function addresseesOf(
  contacts: readonly { name: string; email: string; duty: string }[],
  recipients: readonly { name: string; email: string }[],
): Addressee[] {
  const named = new Set(recipients.map(({ email }) => key(email)));
  const known = new Set(contacts.map(({ email }) => key(email)));
  return [
    ...contacts.map(({ name, email, duty }) => ({
      name,
      email,
      duty,
      chosen: recipients.length === 0 || named.has(key(email)),
    })),
    ...recipients
      .filter(({ email }) => !known.has(key(email)))
      .map(({ name, email }) => ({ name, email, duty: null, chosen: true })),
  ];
}

/** What the draft is saved with: those ticked, without lines that were left empty. */
export const chosenRecipients = (addressees: readonly Addressee[]): { name: string; email: string }[] =>
  addressees
    .filter(({ chosen, name, email }) => chosen && (name.trim() !== "" || email.trim() !== ""))
    .map(({ name, email }) => ({ name, email }));
