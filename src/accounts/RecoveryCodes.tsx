// Recovery codes, shown this once: to be written down or printed before going on.
type Props = { codes: readonly string[]; onKept: () => void; button: string };

export function RecoveryCodes({ codes, onKept, button }: Props) {
  return (
    <section className="recovery" aria-labelledby="recovery-heading">
      <h2 id="recovery-heading">Your recovery codes</h2>
      <p>
        Each opens the desk once when the telephone is lost. They are shown only now: print this page or write
        them down, and keep them apart from the telephone.
      </p>
      <ol className="codes">
        {codes.map((code) => (
          <li key={code}>{code}</li>
        ))}
      </ol>
      <p className="acts">
        <button type="button" className="act" onClick={() => window.print()}>
          Print them
        </button>
        <button type="button" className="act first" onClick={onKept}>
          {button}
        </button>
      </p>
    </section>
  );
}
