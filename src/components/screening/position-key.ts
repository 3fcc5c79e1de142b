/** What the figure and the tables of one page call a position, counted worst first: P1, P2, … */
export const positionKey = (index: number): string => `P${String(index + 1)}`;
