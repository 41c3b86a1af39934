export const SkipLink = () => (
  <a href="#main" className="absolute -top-20 left-(--gutter) z-50 border-2 border-focus bg-sheet px-4 py-2 text-ink focus:top-2">
    Skip to the content
  </a>
);
