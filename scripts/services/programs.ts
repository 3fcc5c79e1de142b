import { accessSync, constants } from "node:fs";
import { delimiter, join } from "node:path";

/** PATH, and the folders of system programs that an ordinary user's PATH lacks on Debian. */
export function programFolders(path = process.env["PATH"] ?? ""): string[] {
  return [...path.split(delimiter).filter(Boolean), "/usr/local/sbin", "/usr/sbin", "/sbin"];
}

/** The full path of a program, or undefined when none of the folders has it. */
export function findProgram(name: string, folders = programFolders()): string | undefined {
  return folders
    .map((folder) => join(folder, name))
    .find((candidate) => {
      try {
        accessSync(candidate, constants.X_OK);
        return true;
      } catch {
        return false;
      }
    });
}
