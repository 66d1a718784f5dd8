// The page contract as it arrives from core/page (write_json and handle_request). Types only: no code is emitted.
// Fields that hold their default are left out of the JSON, so everything but ids and texts is optional here.

/**
 * @typedef {"label" | "number" | "text" | "equation" | "choice" | "button"} CellKind
 * @typedef {"plain" | "quiet" | "strong" | "broken" | "formed" | "caution" | "good"} Tone
 * @typedef {"none" | "typed" | "published" | "estimated" | "derived"} Origin
 * @typedef {"left" | "right" | "centre"} Align
 *
 * @typedef {object} Cell
 * @property {string} [id]          empty for cells that nobody can point at
 * @property {string} [text]
 * @property {string} [edit_text]   what stands in the editor when editing starts
 * @property {string} [hint]
 * @property {string[]} [choices]
 * @property {CellKind} [kind]
 * @property {Tone} [tone]
 * @property {Origin} [origin]
 * @property {boolean} [editable]
 * @property {boolean} [has_working]
 * @property {number} [span]
 *
 * @typedef {object} Column
 * @property {string} id
 * @property {string} [heading]
 * @property {Align} [align]
 * @property {number} [width]         share of the table's width; 0 or absent: as wide as its content
 * @property {boolean} [spine_after]  the rule between broken and formed stands to the right of this column
 *
 * @typedef {object} Row
 * @property {string} id
 * @property {"body" | "detail" | "subtotal" | "result" | "correction"} [role]
 * @property {string} [fold_id]
 * @property {boolean} [open]
 * @property {Cell[]} cells
 *
 * @typedef {object} TableBlock
 * @property {"table"} block
 * @property {string} id
 * @property {"ledger" | "form" | "boxes" | "list" | "banner"} [look]
 * @property {Column[]} columns
 * @property {Row[]} rows
 *
 * @typedef {"axis" | "grid" | "text" | "quiet_text" | "broken" | "formed" | "typed" | "plain" | "accent" | "band"} Ink
 * @typedef {{xy: number[], ink?: Ink, width?: number, dashed?: boolean, arrow?: boolean}} Stroke
 * @typedef {{xy: number[], ink?: Ink}} Fill
 * @typedef {{x: number, y: number, text: string, ink?: Ink, anchor?: Align, size?: number}} Words
 *
 * @typedef {object} DrawingBlock
 * @property {"drawing"} block
 * @property {string} id
 * @property {string} [title]
 * @property {number} width   points
 * @property {number} height  points
 * @property {Fill[]} [fills]
 * @property {Stroke[]} [strokes]
 * @property {Words[]} [words]
 *
 * @typedef {object} NoteBlock
 * @property {"note"} block
 * @property {string} id
 * @property {"info" | "assumption" | "caution" | "disagreement" | "error"} [kind]
 * @property {string} text
 * @property {string[]} [cells]
 *
 * @typedef {object} HeadingBlock
 * @property {"heading"} block
 * @property {string} id
 * @property {string} text
 * @property {string} [aside]
 * @property {number} [level]
 *
 * @typedef {HeadingBlock | TableBlock | DrawingBlock | NoteBlock} Block
 *
 * @typedef {{id: string, text: string, key?: string, enabled?: boolean}} Command
 *
 * @typedef {object} Page
 * @property {string} title
 * @property {number} revision
 * @property {Block[]} blocks
 * @property {Command[]} commands
 *
 * @typedef {object} PageChanges   what changed since a revision
 * @property {string} title
 * @property {number} revision
 * @property {string[]} [order]    ids of all blocks, when any came, went or moved
 * @property {Block[]} blocks      the changed ones
 * @property {Command[]} commands
 *
 * @typedef {object} Margin
 * @property {string} cell
 * @property {string} [value]
 * @property {string} [subject]
 * @property {string[]} [steps]
 * @property {string[]} [sources]
 * @property {{heading: string, notes: {kind?: NoteBlock["kind"], text: string}[]}[]} [sections]
 *
 * @typedef {{code: string, message: string, where?: string, hint?: string}} CoreError
 */

export {};
