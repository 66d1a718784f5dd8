// The roles of the page contract as words: in its JSON, and as classes in the report.
#pragma once

#include "core/page/page.hpp"

namespace heatledger::page {

/// The enumerator in lower case, words parted by '_': "quiet_text".
const char* spelled(CellKind kind);
const char* spelled(Tone tone);
const char* spelled(Origin origin);
const char* spelled(Align align);
const char* spelled(RowRole role);
const char* spelled(TableLook look);
const char* spelled(Ink ink);
const char* spelled(NoteKind kind);

}  // namespace heatledger::page
