// One choice within the filter's sentence.
type Props = { name: string; label: string; value: string; options: readonly (readonly [string, string])[] };

export function FilterChoice({ name, label, value, options }: Props) {
  return (
    <label>
      <span className="vh">{label}</span>
      <select name={name} defaultValue={value}>
        {options.map(([option, words]) => (
          <option key={option} value={option}>
            {words}
          </option>
        ))}
      </select>
    </label>
  );
}
