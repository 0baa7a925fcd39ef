import { type KeyboardEvent, type MouseEvent, useCallback, useEffect, useMemo, useRef, useState } from 'react';
import ReactFlow, { Background, Controls, MiniMap, type Node, ReactFlowProvider, useReactFlow } from 'reactflow';
import 'reactflow/dist/base.css';
import type { DiagramRow, GroupBy } from '#contract/api.ts';
import { nameWords, raised } from '#features/compose/words.ts';
import { type Arrangement, arrange, neighbour } from './arrange.ts';
import { useCanvasData } from './data.ts';
import { Menu, type MenuAt } from './Menu.tsx';
import { nodeTypes } from './nodes.tsx';

interface Props {
  readonly expansion: string;
  readonly by: GroupBy;
  readonly count: number;
  readonly growth: number;
  /** Positions that were found; null when nothing is looked for. */
  readonly found: ReadonlySet<number> | null;
}

const DIRECTIONS: Readonly<Record<string, 'left' | 'right' | 'up' | 'down'>> = {
  ArrowLeft: 'left',
  ArrowRight: 'right',
  ArrowUp: 'up',
  ArrowDown: 'down',
};

/** An overview helps only where not everything is in sight at first; on a small sheet it would cover diagrams. */
const OVERVIEW_FROM = 40;
/** Diagrams whose legs carry numbers; with more, the time of a frame counts, and the sheet is seen from too far to read them. */
const NUMBERED_UP_TO = 150;

const addressOf = (expansion: string, { id }: DiagramRow): string => `/expansions/${expansion}/diagrams/${id}`;

/** A plate's title with Greek letters and raised powers: "lambda^2 rho" → "λ² ρ". */
const subjectOf = (title: string): string =>
  title
    .split(' ')
    .map((word) => {
      const [name = '', power] = word.split('^');
      return nameWords(name) + (power ? raised(power) : '');
    })
    .join(' ');

function nodesOf(
  arrangement: Arrangement,
  found: ReadonlySet<number> | null,
  open: ((key: string) => void) | null,
): Node[] {
  const { cell } = arrangement;
  const numbered = arrangement.plates.reduce((sum, { rows }) => sum + rows.length, 0) <= NUMBERED_UP_TO;
  return arrangement.plates.flatMap(({ plate, rows, title, x, y, width, height, cells }) => [
    {
      id: `plate ${plate.key}`,
      type: 'plate',
      position: { x, y },
      style: { width, height },
      data: {
        title,
        subject: subjectOf(plate.title),
        count: plate.count,
        shown: rows.length,
        open: open && rows.length < plate.count ? () => open(plate.key) : null,
      },
      selectable: false,
    },
    ...cells.map(({ row, x: left, y: top }) => ({
      id: String(row.position),
      type: 'diagram',
      parentNode: `plate ${plate.key}`,
      position: { x: left, y: top },
      style: { width: cell.width, height: cell.height },
      className: found && !found.has(row.position) ? 'dim' : '',
      data: { row, numbered },
    })),
  ]);
}

export default function Canvas(props: Props) {
  return (
    <ReactFlowProvider>
      <Sheet {...props} />
    </ReactFlowProvider>
  );
}

function Sheet({ expansion, by, count, growth, found }: Props) {
  const { plates, pending, error, open } = useCanvasData(expansion, by, count, growth);
  const arrangement = useMemo(() => arrange(plates), [plates]);
  const [at, setAt] = useState<number | null>(null);
  const [selected, setSelected] = useState<readonly string[]>([]);
  const [menu, setMenu] = useState<MenuAt | null>(null);
  const flow = useReactFlow();
  const frame = useRef<HTMLDivElement>(null);
  // The view is fitted when the sheet first appears: it appears when its diagrams are there.
  const loaded = useRef(false);
  if (!pending) loaded.current = true;
  const rows = useMemo(
    () => new Map(plates.flatMap((plate) => plate.rows.map((row) => [row.position, row]))),
    [plates],
  );
  const nodes = useMemo(() => nodesOf(arrangement, found, open), [arrangement, found, open]);
  const shown = useMemo(
    () =>
      nodes.map((node) =>
        node.type === 'diagram' ? { ...node, selected: selected.includes(node.id) || node.id === String(at) } : node,
      ),
    [nodes, selected, at],
  );

  useEffect(() => {
    if (found && found.size > 0)
      flow.fitView({
        nodes: [...found].map((position) => ({ id: String(position) })),
        padding: 0.4,
        maxZoom: 1.4,
        duration: 200,
      });
  }, [found, flow]);

  const show = useCallback((row: DiagramRow) => window.location.assign(addressOf(expansion, row)), [expansion]);

  const onKeyDown = (event: KeyboardEvent) => {
    const direction = DIRECTIONS[event.key];
    if (direction) {
      const next = at === null ? (plates[0]?.rows[0]?.position ?? 1) : neighbour(arrangement, at, direction);
      setAt(next);
      flow.fitView({
        nodes: [{ id: String(next) }],
        padding: 2,
        maxZoom: flow.getZoom(),
        minZoom: flow.getZoom(),
        duration: 120,
      });
      event.preventDefault();
    } else if (event.key === 'Enter' && at !== null && event.target === frame.current) {
      const row = rows.get(at);
      if (row) show(row);
    } else if (event.key === 'Escape') {
      setMenu(null);
      setSelected([]);
    } else if (event.key === 'f' && !event.ctrlKey && !event.metaKey && event.target === frame.current)
      flow.fitView({ duration: 200 });
  };

  const onContext = (event: MouseEvent, node: Node) => {
    const row = rows.get(Number(node.id));
    if (!row) return;
    event.preventDefault();
    setMenu({ x: event.clientX, y: event.clientY, row, address: addressOf(expansion, row) });
  };

  const current = at === null ? null : rows.get(at);
  if (error) return <p className="notice notice-bad">{error}</p>;
  return (
    <>
      <div
        className="canvas"
        ref={frame}
        // biome-ignore lint/a11y/noNoninteractiveTabindex: the canvas is one stop; arrow keys move inside it
        tabIndex={0}
        role="application"
        aria-label="Diagrams on a canvas: arrow keys move from one to the next, Enter opens, f shows all"
        onKeyDown={onKeyDown}
        data-ready={!pending}
      >
        {loaded.current && (
          <ReactFlow
            nodes={shown}
            edges={[]}
            nodeTypes={nodeTypes}
            nodesDraggable={false}
            nodesConnectable={false}
            nodesFocusable={false}
            edgesFocusable={false}
            disableKeyboardA11y
            fitView
            fitViewOptions={{ maxZoom: 1, padding: 0.04 }}
            minZoom={0.05}
            maxZoom={3}
            proOptions={{ hideAttribution: true }}
            onNodeClick={(_, node) => node.type === 'diagram' && setAt(Number(node.id))}
            onNodeDoubleClick={(_, node) => {
              const row = rows.get(Number(node.id));
              if (row) show(row);
            }}
            onNodeContextMenu={onContext}
            onPaneClick={() => setMenu(null)}
            onSelectionChange={({ nodes: chosen }) => {
              const ids = chosen.filter((node) => node.type === 'diagram').map((node) => node.id);
              if (ids.length > 1) setSelected(ids);
            }}
          >
            <Background gap={28} size={1} />
            {nodes.length > OVERVIEW_FROM && <MiniMap pannable zoomable nodeStrokeWidth={2} ariaLabel="Overview" />}
            <Controls showInteractive={false} />
          </ReactFlow>
        )}
        {pending && <p className="loading canvas-loading">Drawing</p>}
        {menu && <Menu {...menu} close={() => setMenu(null)} />}
      </div>
      <p className="hint canvas-status" role="status">
        {selected.length > 1
          ? `${selected.length} diagrams selected: ${selected.slice(0, 12).join(', ')}${selected.length > 12 ? ' …' : ''}`
          : current
            ? `Diagram ${current.position}, S = ${current.symmetryFactor}. ${current.description}`
            : 'Arrow keys or a click choose a diagram; Enter or a double click opens it; Shift and drag select several; f shows all.'}
        {current && selected.length < 2 && (
          <>
            {' '}
            · <a href={addressOf(expansion, current)}>Open</a>
          </>
        )}
      </p>
    </>
  );
}
