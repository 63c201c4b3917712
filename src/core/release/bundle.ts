import { zipSync } from 'fflate';
import type { PlainFile } from './release-files.ts';
import { verifyPython, verifyShell } from './verify-scripts.ts';

/** What is said of a release beside its files; becomes the manifest. */
export interface ReleaseFacts {
  title: string;
  fingerprint: string;
  cautions: string[];
  [more: string]: unknown;
}

export interface BundledFile extends PlainFile {
  sha256: string;
}

export interface Bundle {
  /** In the order of the archive. */
  files: BundledFile[];
  zip: Uint8Array;
  zipSha256: string;
}

/** The one time written into the archive, the first that a zip can hold, so that a rebuilt bundle has the same bytes. */
const fixedTime = new Date(1980, 0, 1);
const regularFile = 0o100644 << 16;
const program = 0o100755 << 16;

/** A bundle: the manifest with the digest of each file, a list of digests, two programs that check them, a read-me, and
 *  the files, in one folder of a zip. The same facts and files give the same bytes. */
export async function bundleRelease(facts: ReleaseFacts, contents: PlainFile[], folder: string): Promise<Bundle> {
  const listed = await Promise.all(
    [
      textFile('README.txt', 'what this is, and how to check it', readMe(facts, contents)),
      ...contents,
      textFile('verify.py', 'checks the digests with Python', verifyPython, 'text/x-python'),
      textFile('verify.sh', 'checks the digests with a POSIX shell', verifyShell, 'text/x-shellscript'),
    ].map(digested),
  );
  const manifest = {
    ...facts,
    files: listed.map(({ name, title, mediaType, bytes, sha256 }) => ({
      ...{ name, title, mediaType, sizeBytes: bytes.length, sha256 },
    })),
  };
  const manifestFile = await digested(
    textFile('manifest.json', 'everything known of this release', json(manifest), 'application/json'),
  );
  const sums = [manifestFile, ...listed].map(({ sha256, name }) => `${sha256}  ${name}\n`).join('');
  const files = [manifestFile, await digested(textFile('SHA256SUMS', 'digests of the files', sums)), ...listed];
  const zip = zipSync(
    Object.fromEntries(
      files.map(({ name, bytes }) => [
        `${folder}/${name}`,
        [bytes, { attrs: name.startsWith('verify.') ? program : regularFile, os: 3 }] as const,
      ]),
    ) as Parameters<typeof zipSync>[0],
    { level: 6, mtime: fixedTime },
  );
  return { files, zip, zipSha256: await sha256(zip) };
}

const json = (value: unknown) => `${JSON.stringify(value, null, 2)}\n`;

function textFile(name: string, title: string, text: string, mediaType = 'text/plain'): PlainFile {
  return { name, title, mediaType, bytes: new TextEncoder().encode(text) };
}

const digested = async (file: PlainFile): Promise<BundledFile> => ({ ...file, sha256: await sha256(file.bytes) });

async function sha256(bytes: Uint8Array): Promise<string> {
  const digest = new Uint8Array(await crypto.subtle.digest('SHA-256', bytes as Uint8Array<ArrayBuffer>));
  return Array.from(digest, (byte) => byte.toString(16).padStart(2, '0')).join('');
}

function readMe({ title, fingerprint, cautions }: ReleaseFacts, contents: PlainFile[]): string {
  const widest = Math.max(...contents.map(({ name }) => name.length), 13);
  const list = [
    { name: 'manifest.json', title: 'how the code came about, what is known of it and how, and every digest' },
    ...contents,
  ].map((file) => `  ${file.name.padEnd(widest)}  ${file.title}\n`);
  return `${title}

Fingerprint of the matrix (SHA-256 over little-endian 32-bit words: rows, columns, then each row's weight and its
columns from 0, ascending):
  ${fingerprint}

${list.join('')}
To check that nothing was altered, run either of

  python3 verify.py
  sh verify.sh

and compare the fingerprint with the one given to you by another way.

${cautions.map((caution) => `Caution. ${caution}\n`).join('\n')}`;
}
