/** All recipes; each record of the data has exactly one. */
import { BUDGET_RECIPES } from './recipes-budgets';
import { CASCADE_RECIPES } from './recipes-cascades';
import { LEVEL_RECIPES } from './recipes-levels';
import { NOISE_RECIPES } from './recipes-noise';
import { PROPAGATION_RECIPES } from './recipes-propagation';
import type { Recipe } from './records';
import { TOLERANCE_RECIPES } from './recipes-tolerances';

export const RECIPES: readonly Recipe[] = [
  ...NOISE_RECIPES,
  ...LEVEL_RECIPES,
  ...CASCADE_RECIPES,
  ...PROPAGATION_RECIPES,
  ...BUDGET_RECIPES,
  ...TOLERANCE_RECIPES,
];

/** The recipe of a record. Throws when it has none or several. */
export function recipeOf(id: string): Recipe {
  const [recipe, other] = RECIPES.filter(({ ids }) => ids.test(id));
  if (recipe === undefined || other !== undefined)
    throw new Error(`${id} has ${recipe === undefined ? 'no recipe' : 'two recipes'}`);
  return recipe;
}
