/** The house mark: the boards of one log in the order they were sawn, the heart in the middle. Decoration beside the name. */
export function Mark({ className }: { className?: string }) {
  return (
    <svg
      viewBox="0 0 30 24"
      aria-hidden="true"
      focusable="false"
      className={className}
      fill="none"
      stroke="currentColor"
    >
      <g strokeWidth="1.6" strokeLinecap="round">
        <path d="M13.9 2v20M16.1 2v20" />
        <path d="M11 3.2c-2.6 5-2.6 12.6 0 17.6M19 3.2c2.6 5 2.6 12.6 0 17.6" />
        <path d="M7.6 4.6c-3.4 4-3.4 10.8 0 14.8M22.4 4.6c3.4 4 3.4 10.8 0 14.8" />
        <path d="M4.3 6.6c-3.3 2.8-3.3 8 0 10.8M25.7 6.6c3.3 2.8 3.3 8 0 10.8" />
      </g>
    </svg>
  );
}
