'use client';

/** Hands a text to the browser as a file. */
export function DownloadCsv({ name, text, label }: { name: string; text: string; label: string }) {
  const save = () => {
    // A byte order mark, so that spreadsheets read names with accents as they are.
    const url = URL.createObjectURL(new Blob(['\uFEFF', text], { type: 'text/csv;charset=utf-8' }));
    const link = document.createElement('a');
    link.href = url;
    link.download = name;
    link.click();
    URL.revokeObjectURL(url);
  };
  return (
    <button
      type="button"
      onClick={save}
      className="min-h-6 font-label text-label font-semibold text-chalk underline underline-offset-4"
    >
      {label}
    </button>
  );
}
