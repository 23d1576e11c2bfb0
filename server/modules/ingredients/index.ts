export { ingredientRoutes } from './ingredient.routes.ts';
