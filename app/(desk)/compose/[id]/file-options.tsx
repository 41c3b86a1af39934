/**
 * Files to choose from. The one that is chosen is always among them: a select drops a value that it has
 * no option for, and a declaration may come before its file.
 */
export function FileOptions({ files, chosen }: { readonly files: readonly string[]; readonly chosen: string }) {
  const all = chosen === '' || files.includes(chosen) ? files : [...files, chosen];
  return (
    <>
      <option value="">choose a file</option>
      {all.map((name) => <option key={name} value={name}>{files.includes(name) ? name : `${name} (not added yet)`}</option>)}
    </>
  );
}
