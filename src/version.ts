/** Version of the program, as in package.json (a test keeps them equal); stands in results.json. */
export const VERSION = '1.0.0';
