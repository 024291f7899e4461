export { correlationTable } from './correlation-table.js';
export { fitGradient, type GradientFit } from './gradient.js';
export { sectionOrder } from './section-order.js';
