export interface FreezeOptions {
  /** Columns that may still change, such as the time a message was sent. */
  except?: readonly string[];
  /** SQL condition on `old`: only rows for which it holds are frozen. Absent: every row from its first moment. */
  onlyWhen?: string;
}

const identifier = /^[a-z][a-z0-9_]*$/;
const checked = (name: string): string => {
  if (!identifier.test(name)) throw new Error(`"${name}" is not a plain table or column name.`);
  return name;
};

/** The functions behind `freezeTable`; made once, by the first migration. */
export const freezeFunctionsSql = [
  `create function refuse_change() returns trigger language plpgsql as $$
begin
  if tg_op = 'UPDATE' and tg_nargs > 0
     and (to_jsonb(old) - tg_argv::text[]) = (to_jsonb(new) - tg_argv::text[]) then
    return new;
  end if;
  raise exception 'rows of % are kept as they were written', tg_table_name using errcode = 'EB001';
end $$`,
  `create function refuse_truncate() returns trigger language plpgsql as $$
begin
  raise exception 'rows of % are kept as they were written', tg_table_name using errcode = 'EB001';
end $$`,
];

/**
 * SQL statements that make a table's rows unchangeable: updates, deletes and TRUNCATE raise EB001, also in
 * replication mode (ENABLE ALWAYS) and also for the tables' owner. The application role's grants follow from
 * these triggers (see grants.ts): on a table frozen without exception it gets SELECT and INSERT only.
 */
export const freezeTable = (table: string, options: FreezeOptions = {}): string[] => {
  const name = checked(table);
  const args = (options.except ?? []).map((column) => `'${checked(column)}'`).join(', ');
  const condition = options.onlyWhen ? ` when (${options.onlyWhen})` : '';
  return [
    `create trigger freeze_row before update or delete on "${name}" for each row${condition} execute function refuse_change(${args})`,
    `alter table "${name}" enable always trigger freeze_row`,
    `create trigger freeze_truncate before truncate on "${name}" for each statement execute function refuse_truncate()`,
    `alter table "${name}" enable always trigger freeze_truncate`,
  ];
};
