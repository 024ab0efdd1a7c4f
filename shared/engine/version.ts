/** Version of the computing engine, kept with every result; it changes when any number the engine gives can change. */
export const ENGINE_VERSION = '1.0.0';
