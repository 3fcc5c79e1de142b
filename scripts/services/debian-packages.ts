import { findProgram, programFolders } from "./programs";
import { runCommand, type CommandResult } from "./run-command";

export interface Requirement {
  /** What it is for, in words: "MariaDB's server". */
  what: string;
  /** The programs that must be there. */
  programs: readonly string[];
  /** Debian's packages that bring them. */
  packages: readonly string[];
}

/** Only the programs: the full `mariadb-server` package would also start a database of the whole machine. */
export const mariaDbServer: Requirement = {
  what: "MariaDB's server",
  programs: ["mariadbd", "mariadb-install-db", "my_print_defaults"],
  packages: ["mariadb-server-core", "mariadb-client-core"],
};

export const chromiumBrowser: Requirement = {
  what: "the Chromium browser",
  programs: ["chromium"],
  packages: ["chromium"],
};

export class InstallFailure extends Error {
  constructor(
    readonly requirement: Requirement,
    reason: string,
    command: string,
  ) {
    super(
      `${requirement.what} (Debian package ${requirement.packages.join(", ")}) is not installed, ` +
        `and ${reason}. Run "${command} ${requirement.packages.join(" ")}" and try again.`,
    );
  }
}

interface Surroundings {
  folders?: readonly string[];
  userId?: number;
  report?: (line: string) => void;
}

/**
 * Installs what is missing from Debian's packages, as root or through a sudo that asks for nothing.
 * @throws InstallFailure that names the package when it may not or can not.
 */
export async function ensureInstalled(
  requirement: Requirement,
  { folders = programFolders(), userId = process.getuid?.() ?? 0, report = () => {} }: Surroundings = {},
): Promise<void> {
  const missing = () => requirement.programs.filter((program) => !findProgram(program, [...folders]));
  if (missing().length === 0) return;

  const aptGet = findProgram("apt-get", [...folders]);
  if (!aptGet) throw new InstallFailure(requirement, "this machine has no apt-get", "sudo apt-get install");
  const prefix = await rightToInstall(requirement, [...folders], userId);
  const apt = (...args: string[]): Promise<CommandResult> => {
    const [command = aptGet, ...rest] = [...prefix, aptGet, ...args];
    return runCommand(command, rest, { env: { ...process.env, DEBIAN_FRONTEND: "noninteractive" } });
  };

  report(`Installing ${requirement.what} from Debian's packages (${requirement.packages.join(", ")}) …`);
  const install = () => apt("install", "-y", "--no-install-recommends", ...requirement.packages);
  let result = await install();
  if (result.status !== 0) {
    await apt("update");
    result = await install();
  }
  if (result.status !== 0) {
    const lastLine = result.stderr.trim().split("\n").at(-1) ?? "";
    throw new InstallFailure(
      requirement,
      `apt-get could not install it: ${lastLine}`,
      "sudo apt-get install",
    );
  }
  const stillMissing = missing();
  if (stillMissing.length > 0) {
    const reason = `the installed package has no program ${stillMissing.join(", ")}`;
    throw new InstallFailure(requirement, reason, "sudo apt-get install --reinstall");
  }
}

async function rightToInstall(
  requirement: Requirement,
  folders: string[],
  userId: number,
): Promise<readonly string[]> {
  if (userId === 0) return [];
  const sudo = findProgram("sudo", folders);
  if (sudo && (await runCommand(sudo, ["-n", "true"])).status === 0) return [sudo, "-n"];
  throw new InstallFailure(requirement, "this user has no right to install packages", "sudo apt-get install");
}
