import { databaseFile } from '../config.ts';
import { backUp, filesBeside } from '../db/backup.ts';
import { filesFolder } from '../files/open-storage.ts';
import { fileArgument, runCommand } from './arguments.ts';

const file = fileArgument('backup');
await runCommand(async () => {
  const folder = filesFolder();
  const { bytes, released } = await backUp(databaseFile(), file, folder);
  const copied = `${released} released ${released === 1 ? 'file' : 'files'} to ${filesBeside(file)}`;
  const files = folder === undefined ? ' Released files lie in the S3 bucket and were not copied.' : ` And ${copied}.`;
  return `Backed up ${databaseFile()} to ${file} (${bytes} bytes, checked).${folder && released === 0 ? '' : files}`;
});
