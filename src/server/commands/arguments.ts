/** The one file that a command is given. Says how to call it, and ends, when there is none. */
export function fileArgument(command: string): string {
  const [file, ...more] = process.argv.slice(2);
  if (file !== undefined && file.trim() !== '' && more.length === 0) return file;
  console.error(`Usage: npm run ${command} FILE`);
  process.exit(1);
}

/** Runs a command to its end; a failure is one line and status 1. */
export async function runCommand(work: () => Promise<string>): Promise<void> {
  try {
    console.log(await work());
  } catch (error) {
    console.error((error as Error).message);
    process.exitCode = 1;
  }
}
