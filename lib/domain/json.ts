/** A JSON object as kept in a column; whoever reads it narrows it first. */
export type JsonObject = Readonly<Record<string, unknown>>;
