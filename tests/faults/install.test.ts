import { chmodSync, existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from "node:fs";
import { tmpdir } from "node:os";
import { join } from "node:path";
import { afterEach, beforeEach, expect, test } from "vitest";
import { ensureInstalled, mariaDbServer } from "../../scripts/services/debian-packages";

/** A machine of one folder of programs. */
let folder: string;
const program = (name: string, script: string) => {
  writeFileSync(join(folder, name), `#!/bin/sh\n${script}\n`);
  chmodSync(join(folder, name), 0o755);
};
const calls = () => (existsSync(join(folder, "calls")) ? readFileSync(join(folder, "calls"), "utf8") : "");
const install = (userId: number) => ensureInstalled(mariaDbServer, { folders: [folder], userId });
const apt = (body: string) => program("apt-get", `echo "$@" >> ${folder}/calls\n${body}`);
const bringPrograms = mariaDbServer.programs
  .map((name) => `echo "#!/bin/sh" > ${name} && chmod +x ${name}`)
  .join(" && ");

beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), "programs-"));
});

afterEach(() => rmSync(folder, { recursive: true }));

test("nothing is installed when the programs are there", async () => {
  for (const name of mariaDbServer.programs) program(name, "");
  apt("exit 1");
  await install(1000);
  expect(calls()).toBe("");
});

test("no right to install names the package and the command", async () => {
  apt("exit 0");
  program("sudo", "exit 1");
  await expect(install(1000)).rejects.toThrow(
    /MariaDB's server \(Debian package mariadb-server-core.*no right.*"sudo apt-get install mariadb-server-core/,
  );
  expect(calls()).toBe("");
});

test("a machine without apt-get is told the package too", async () => {
  await expect(install(0)).rejects.toThrow(/mariadb-server-core.*no apt-get/);
});

test("root installs, with a sudo that asks for nothing others do too", async () => {
  apt(`cd ${folder} && ${bringPrograms}`);
  await install(0);
  expect(calls()).toBe("install -y --no-install-recommends mariadb-server-core mariadb-client-core\n");
  for (const name of mariaDbServer.programs) rmSync(join(folder, name));
  program("sudo", 'test "$1" = -n && shift && exec "$@"');
  program("true", "");
  await install(1000);
  expect(calls().trim().split("\n")).toHaveLength(2);
});

test("stale package lists are updated once; a failure says what apt-get said", async () => {
  apt('test "$1" = update || { echo "E: Unable to locate package" >&2; exit 100; }');
  await expect(install(0)).rejects.toThrow(/apt-get could not install it: E: Unable to locate package/);
  expect(
    calls()
      .trim()
      .split("\n")
      .map((call) => call.split(" ")[0]),
  ).toEqual(["install", "update", "install"]);
});
