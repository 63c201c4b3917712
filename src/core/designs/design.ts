import { type Citation, ParamError } from '../errors.ts';
import type { BlockDesign, DesignSpec } from './block-design.ts';
import { families, familyById } from './families/index.ts';
import type { DesignPrediction, ParamInfo } from './family.ts';

/** What a form or a document needs of each family, in the order shown. */
export function listFamilies(): { id: string; title: string; params: ParamInfo[]; source: Citation }[] {
  return families.map(({ id, title, params, source }) => ({ id, title, params, source }));
}

/** The design's parameters, and those of its codes, by closed formulas.
 *  @throws ParamError on an unknown family or a wrong parameter; InfeasibleError when no such design exists. */
export function predictDesign(spec: DesignSpec): DesignPrediction {
  const family = familyOf(spec);
  return family.predict(family.parse(spec.params));
}

/** The design itself, stamped with its spec.
 *  @throws ParamError, InfeasibleError, or LimitError when it is larger than what is built here. */
export function buildDesign(spec: DesignSpec): BlockDesign {
  const family = familyOf(spec);
  return family.build(family.parse(spec.params));
}

function familyOf(spec: DesignSpec) {
  if (typeof spec?.family !== 'string') throw new ParamError('family', spec?.family, 'the id of a family');
  return familyById(spec.family);
}
