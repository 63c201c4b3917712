import { databaseFile } from '../config.ts';
import { restore } from '../db/restore.ts';
import { filesFolder } from '../files/open-storage.ts';
import { fileArgument, runCommand } from './arguments.ts';

const file = fileArgument('restore');
await runCommand(async () => {
  const aside = await restore(databaseFile(), file, filesFolder());
  const before = aside ? ` What was there before is in ${aside}.` : '';
  return `Restored ${databaseFile()} from ${file}. Everybody has to sign in again.${before}`;
});
