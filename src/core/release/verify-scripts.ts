/** Checks a bundle with nothing but Python: digests and sizes against the manifest, SHA256SUMS against it too, and the
 *  fingerprint out of the alist file, where the bundle has one. */
export const verifyPython = `#!/usr/bin/env python3
"""Checks the files of this release against manifest.json. Needs Python 3.6 or later and nothing else.

Run it anywhere: python3 verify.py [folder]. It ends with 0 when everything agrees and with 1 otherwise.
"""
import hashlib
import json
import os
import struct
import sys


def digest(path):
    h = hashlib.sha256()
    with open(path, "rb") as f:
        for piece in iter(lambda: f.read(1 << 20), b""):
            h.update(piece)
    return h.hexdigest()


def alist_fingerprint(path):
    """SHA-256 over little-endian 32-bit words: rows, cols, then each row's weight and its columns from 0, ascending."""
    with open(path) as f:
        numbers = list(map(int, f.read().split()))
    cols, rows, widest_column, widest_row = numbers[:4]
    row_weights = numbers[4 + cols:4 + cols + rows]
    at = 4 + cols + rows + cols * widest_column
    h = hashlib.sha256(struct.pack("<2I", rows, cols))
    for weight in row_weights:
        row = sorted(c - 1 for c in numbers[at:at + weight])
        h.update(struct.pack("<%dI" % (1 + weight), weight, *row))
        at += widest_row
    return h.hexdigest()


def main():
    folder = sys.argv[1] if len(sys.argv) > 1 else os.path.dirname(os.path.abspath(__file__))
    inside = lambda name: os.path.join(folder, name)
    with open(inside("manifest.json"), encoding="utf-8") as f:
        manifest = json.load(f)
    faults = 0

    def say(good, name, words):
        nonlocal faults
        faults += not good
        print("%s %s: %s" % ("ok    " if good else "WRONG ", name, words))

    stated = {}
    with open(inside("SHA256SUMS"), encoding="utf-8") as f:
        for line in f:
            stated[line[66:].rstrip("\\n")] = line[:64]
    known = {"manifest.json", "SHA256SUMS"}
    for entry in manifest["files"]:
        name = entry["name"]
        known.add(name)
        if os.path.basename(name) != name:
            say(False, name, "not a plain file name")
        elif not os.path.isfile(inside(name)):
            say(False, name, "missing")
        elif os.path.getsize(inside(name)) != entry["sizeBytes"]:
            say(False, name, "%d bytes, the manifest says %d" % (os.path.getsize(inside(name)), entry["sizeBytes"]))
        elif digest(inside(name)) != entry["sha256"]:
            say(False, name, "SHA-256 differs from the manifest")
        elif stated.get(name) != entry["sha256"]:
            say(False, name, "SHA256SUMS and the manifest disagree")
        else:
            say(True, name, "SHA-256 agrees")
    say(stated.get("manifest.json") == digest(inside("manifest.json")), "manifest.json", "against SHA256SUMS")
    for name in sorted(set(stated) - known):
        say(False, name, "in SHA256SUMS, not in the manifest")
    if any(entry["name"] == "H.alist" for entry in manifest["files"]) and os.path.isfile(inside("H.alist")):
        try:
            agrees = alist_fingerprint(inside("H.alist")) == manifest["fingerprint"]
        except (ValueError, IndexError, struct.error):
            agrees = False
        say(agrees, "fingerprint", "of the matrix in H.alist against the manifest")
    for name in sorted(set(os.listdir(folder)) - known):
        print("note   %s: not part of the release" % name)
    print("%s: %s" % (manifest["title"], "everything agrees" if not faults else "%d WRONG" % faults))
    return 1 if faults else 0


if __name__ == "__main__":
    sys.exit(main())
`;

/** The same digests by the shell alone, with whichever of three usual programs for SHA-256 is there. */
export const verifyShell = `#!/bin/sh
# Checks the files of this release against SHA256SUMS, and SHA256SUMS against manifest.json. POSIX shell, and one of
# sha256sum, shasum or openssl. Ends with 0 when everything agrees, with 1 otherwise.
cd "\${1:-$(dirname "$0")}" || exit 1

if command -v sha256sum >/dev/null 2>&1; then
  digest() { sha256sum <"$1" | cut -c1-64; }
elif command -v shasum >/dev/null 2>&1; then
  digest() { shasum -a 256 <"$1" | cut -c1-64; }
elif command -v openssl >/dev/null 2>&1; then
  digest() { openssl dgst -sha256 <"$1" | sed 's/.* //' | cut -c1-64; }
else
  echo "none of sha256sum, shasum and openssl is here" >&2
  exit 1
fi

faults=0
count=0
wrong() {
  echo "WRONG  $1: $2"
  faults=$((faults + 1))
}

while IFS= read -r line; do
  stated=\${line%% *}
  name=\${line#*  }
  count=$((count + 1))
  case $name in */*) wrong "$name" "not a plain file name"; continue ;; esac
  if [ ! -f "$name" ]; then
    wrong "$name" "missing"
  elif [ "$(digest "$name")" != "$stated" ]; then
    wrong "$name" "SHA-256 differs from SHA256SUMS"
  elif [ "$name" != manifest.json ] && ! grep -q "\\"sha256\\": \\"$stated\\"" manifest.json; then
    wrong "$name" "SHA256SUMS and the manifest disagree"
  else
    echo "ok     $name"
  fi
done <SHA256SUMS

listed=$(grep -c '"sha256": "' manifest.json)
[ "$count" -eq $((listed + 1)) ] || wrong SHA256SUMS "$count lines, the manifest asks for $((listed + 1))"

if [ "$faults" -eq 0 ]; then
  echo "everything agrees"
else
  echo "$faults WRONG"
  exit 1
fi
`;
