import type { SparseMatrix } from '@/core/codes/sparse-matrix.ts';
import type { DecoderSpec } from '@/core/decoders/decoder-spec.ts';
import type { DesignSpec } from '@/core/designs/block-design.ts';
import type { Graded } from '@/core/evidence.ts';
import type { GeneratorForm } from '@/core/formats/generator-forms.ts';
import type { WordForm } from '@/core/formats/word-forms.ts';
import type { Bundle, ReleaseFacts } from '@/core/release/bundle.ts';
import type { ReleaseContents, ReleasedCode } from '@/core/release/release-files.ts';
import type { RunSpec } from '@/core/simulation/run-spec.ts';
import type { Tally } from '@/core/simulation/tally.ts';
import type { VectorRequest } from '@/core/test-vectors/test-vectors.ts';
import type { VectorForm, VectorHead } from '@/core/test-vectors/vector-files.ts';
import type { WorkerFailure } from '../failure.ts';

/** A file, or a bundle of them, that is too much work for the server's own thread. */
export type FilesRequest =
  | { kind: 'blocks'; design: DesignSpec; form: 'text' | 'json'; provenance: Record<string, unknown> }
  | { kind: 'generator'; H: SparseMatrix; form: GeneratorForm['id'] }
  | { kind: 'words'; words: SparseMatrix; form: WordForm['id'] }
  | { kind: 'vectors'; H: SparseMatrix; request: VectorRequest; form: VectorForm; head: VectorHead }
  | { kind: 'shards'; H: SparseMatrix; shards: (Omit<RunSpec, 'H'> & { index: number })[] }
  | { kind: 'radius'; H: SparseMatrix; decoders: DecoderSpec[] }
  | { kind: 'bundle'; code: ReleasedCode; contents: ReleaseContents; facts: ReleaseFacts; folder: string };

/** A file's bytes come in parts before the answer; a bundle, the tallies of shards computed again, or the radii proved for
 *  decoders, come with it. */
export type FilesAnswer =
  | { ok: true; bundle?: Bundle; tallies?: Tally[]; radii?: (Graded<number> | null)[] }
  | { ok: false; failure: WorkerFailure };
