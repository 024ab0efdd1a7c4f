const snakeKey = (key: string) => key.replace(/[A-Z]/g, (letter) => `_${letter.toLowerCase()}`);

/** Records as the text that `jsonb_to_recordset` takes, their keys renamed to column names; nested values stay as they are. */
export function jsonRows(records: readonly object[]): string {
  return JSON.stringify(
    records.map((record) => Object.fromEntries(Object.entries(record).map(([key, value]) => [snakeKey(key), value]))),
  );
}
