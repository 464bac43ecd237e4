// The house's mark: a driven peg seen end on, with the wedge that holds it.
export function PegMark() {
  return (
    <svg className="peg-mark" viewBox="0 0 24 24" aria-hidden="true" focusable="false">
      <path fill="currentColor" d="M7.3 1.9 16.3 1.4 22.2 7.3 22.7 16.1 16.8 22.3 7.7 22.7 1.5 17 1.3 7.6Z" />
      <path className="peg-wedge" d="M3.9 10.6 20.3 12.4 20 14 3.7 12.7Z" />
      <path
        className="peg-rings"
        d="M7.2 8.2C9.6 5.7 14.4 5.6 17 8.4M9.6 5.2l2.6-.7M7 16.2c2.7 2.5 7.1 2.6 9.9.6M10.2 19.6l3.1-.1"
      />
    </svg>
  );
}
