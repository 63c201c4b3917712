import { databaseFile } from '../config.ts';
import { backUp } from '../db/backup.ts';
import { fileArgument, runCommand } from './arguments.ts';

const file = fileArgument('backup');
await runCommand(async () => {
  const bytes = await backUp(databaseFile(), file);
  return `Backed up ${databaseFile()} to ${file} (${bytes} bytes, checked).`;
});
