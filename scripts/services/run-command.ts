import { spawn } from "node:child_process";

export interface CommandResult {
  status: number;
  stdout: string;
  stderr: string;
}

interface CommandOptions {
  env?: NodeJS.ProcessEnv;
  cwd?: string;
  /** Show the output as it comes, beside keeping it. */
  echo?: boolean;
}

/** Runs a command to its end; a command that can't be started answers with status 127. */
export function runCommand(
  command: string,
  args: readonly string[],
  options: CommandOptions = {},
): Promise<CommandResult> {
  return new Promise((resolve) => {
    const child = spawn(command, args, {
      stdio: ["ignore", "pipe", "pipe"],
      ...(options.env ? { env: options.env } : {}),
      ...(options.cwd ? { cwd: options.cwd } : {}),
    });
    let stdout = "";
    let stderr = "";
    child.stdout.on("data", (chunk: Buffer) => {
      stdout += chunk.toString("utf8");
      if (options.echo) process.stdout.write(chunk);
    });
    child.stderr.on("data", (chunk: Buffer) => {
      stderr += chunk.toString("utf8");
      if (options.echo) process.stderr.write(chunk);
    });
    child.once("error", (error) => resolve({ status: 127, stdout, stderr: stderr + String(error) }));
    child.once("close", (code) => resolve({ status: code ?? 1, stdout, stderr }));
  });
}
