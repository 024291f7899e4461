export { correlationTable } from './correlation-table.js';
export { sectionOrder } from './section-order.js';
