import { ParamError } from '../../errors.ts';
import type { Family } from '../family.ts';
import { classesKept } from '../operations/classes.ts';
import { complement } from '../operations/complement.ts';
import { derived } from '../operations/derived.ts';
import { dual } from '../operations/dual.ts';
import { relabel } from '../operations/relabel.ts';
import { residual } from '../operations/residual.ts';
import { union } from '../operations/union.ts';
import { affineGeometry } from './affine-geometry.ts';
import { affinePlane } from './affine-plane.ts';
import { biplane } from './biplane.ts';
import { covering } from './covering.ts';
import { cyclicDifferenceFamily } from './cyclic-difference-family.ts';
import { denniston } from './denniston.ts';
import { generalisedQuadrangle } from './generalised-quadrangle.ts';
import { hadamard } from './hadamard.ts';
import { hermitianUnital } from './hermitian-unital.ts';
import { inversivePlane } from './inversive-plane.ts';
import { kirkmanTriple } from './kirkman-triple.ts';
import { linearGroupSteiner } from './linear-group-steiner.ts';
import { lu3 } from './lu3.ts';
import { packing } from './packing.ts';
import { projectiveGeometry } from './projective-geometry.ts';
import { projectivePlane } from './projective-plane.ts';
import { projectiveSpread } from './projective-spread.ts';
import { puncturedAffinePlane } from './punctured-affine-plane.ts';
import { quadraticResidue } from './quadratic-residue.ts';
import { reeUnital } from './ree-unital.ts';
import { sphericalGeometry } from './spherical-geometry.ts';
import { splitCayleyHexagon } from './split-cayley-hexagon.ts';
import { steinerQuadruple } from './steiner-quadruple.ts';
import { steinerTriple } from './steiner-triple.ts';
import { transversal } from './transversal.ts';
import { witt } from './witt.ts';

/** Every family the program builds, in the order shown. A family is added by one file here and one line below. */
export const families: readonly Family[] = [
  projectivePlane, //
  puncturedAffinePlane,
  affinePlane,
  projectiveGeometry,
  affineGeometry,
  inversivePlane,
  sphericalGeometry,
  hermitianUnital,
  reeUnital,
  denniston,
  generalisedQuadrangle,
  lu3,
  splitCayleyHexagon,
  linearGroupSteiner,
  projectiveSpread,
  steinerTriple,
  kirkmanTriple,
  steinerQuadruple,
  witt,
  transversal,
  quadraticResidue,
  hadamard,
  cyclicDifferenceFamily,
  biplane,
  packing,
  covering,
  derived,
  residual,
  complement,
  dual,
  classesKept,
  union,
  relabel,
];

/** The family with this id. @throws ParamError that lists every id. */
export function familyById(id: string): Family {
  const family = families.find((f) => f.id === id);
  if (!family) throw new ParamError('family', id, `one of ${families.map((f) => f.id).join(', ')}`);
  return family;
}
