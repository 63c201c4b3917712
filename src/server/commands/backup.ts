import { databaseFile } from '../config.ts';
import { backUp, filesBeside } from '../db/backup.ts';
import { filesFolder } from '../files/open-storage.ts';
import { fileArgument, runCommand } from './arguments.ts';

const file = fileArgument('backup');
await runCommand(async () => {
  const folder = filesFolder();
  const { bytes, released } = await backUp(databaseFile(), file, folder);
  const done = `Backed up ${databaseFile()} to ${file} (${bytes} bytes, checked).`;
  if (folder === undefined) return `${done} Released files lie in the S3 bucket and were not copied.`;
  if (released === 0) return done;
  return `${done} And ${released} released ${released === 1 ? 'file' : 'files'} to ${filesBeside(file)}.`;
});
