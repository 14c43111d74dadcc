/** Version of the engine, written into every head that it makes. A test holds it against package.json. */
export const VERSION = '0.1.0';
