/** Options of a foreign-key column; deleting a referenced row is refused unless it owns this one. */
export function reference(table: string, onDelete: 'CASCADE' | 'RESTRICT' = 'RESTRICT') {
  return { references: { model: table, key: 'id' }, onDelete, onUpdate: 'CASCADE' };
}
