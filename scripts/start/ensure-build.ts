import { build, isBuildCurrent } from "../services/build";
import { StartFailure } from "./start-failure";

export async function ensureBuild(report: (line: string) => void): Promise<void> {
  if (isBuildCurrent()) return;
  report("Building (the sources changed) …");
  const result = await build();
  if (result.status === 0) return;
  const lines = `${result.stdout}\n${result.stderr}`.trim().split("\n").slice(-30).join("\n");
  throw new StartFailure("build", `The build failed. Mend what it says and start again:\n${lines}`);
}
