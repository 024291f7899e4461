export { analyse } from './pipeline.js';
export * from './model/index.js';
export { VERSION } from './version.js';
