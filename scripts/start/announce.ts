import type { FakePerson } from "../services/fakes";

interface Running {
  appOrigin: string;
  dataFolder?: string;
  mailbox?: string;
  people?: readonly FakePerson[];
}

/** What somebody needs who has just started it: one address, who can sign in, where the mail is. */
export function announce(
  { appOrigin, dataFolder, mailbox, people = [] }: Running,
  print: (line: string) => void,
): void {
  const width = Math.max(0, ...people.map(({ name }) => name.length));
  const lines = [
    "",
    `Stillneedle runs at  ${appOrigin}`,
    ...(mailbox ? [`The mailbox is at    ${mailbox}`] : []),
    ...(people.length > 0 ? ["", "Who can sign in:"] : []),
    ...people.map(({ name, remark, email }) => `  ${name.padEnd(width)}  ${remark} (${email})`),
    ...(dataFolder ? ["", `Data and logs are kept in ${dataFolder}.`] : []),
    "Ctrl-C stops it.",
  ];
  for (const line of lines) print(line);
}
