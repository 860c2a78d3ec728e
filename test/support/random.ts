/** Tests and the demo draw from the same seeded generator. */
export { type Random, seeded } from '../../server/src/demo/random';
