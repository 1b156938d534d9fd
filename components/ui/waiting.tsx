/** Waiting: the tube with the bubble on its way to the ticks; how far it is, where that is known. */
export function Waiting({ done, total, children }: { done?: number; total?: number; children: React.ReactNode }) {
  const known = done !== undefined && total !== undefined && total > 0;
  return (
    <div className="waiting" role="status">
      <div className="wait">
        <span style={known ? { left: `${4 + (40 * Math.min(done, total)) / total}%`, animation: 'none' } : undefined} />
      </div>
      {children}
    </div>
  );
}
