export { addIngredient } from './ingredient.service.ts';
export { ingredientRoutes } from './ingredient.routes.ts';
export { toIngredientSnapshot } from './ingredient.mapper.ts';
export { findIngredients } from './ingredient.queries.ts';
export { stockTeam } from './generic-back-bar.ts';
