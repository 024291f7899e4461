/* What `run` needs of the results folder before anything is written; small, so that it loads fast. */
export { placesOf } from '../output/folder/places.js';
export { holdFolder, refuseForeign } from '../output/folder/replace-folder.js';
