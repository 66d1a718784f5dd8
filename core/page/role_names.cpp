#include "core/page/role_names.hpp"

namespace heatledger::page {

const char* spelled(CellKind kind) {
  switch (kind) {
    case CellKind::Label:
      return "label";
    case CellKind::Number:
      return "number";
    case CellKind::Text:
      return "text";
    case CellKind::Equation:
      return "equation";
    case CellKind::Choice:
      return "choice";
    case CellKind::Button:
      return "button";
  }
  return "";
}

const char* spelled(Tone tone) {
  switch (tone) {
    case Tone::Plain:
      return "plain";
    case Tone::Quiet:
      return "quiet";
    case Tone::Strong:
      return "strong";
    case Tone::Broken:
      return "broken";
    case Tone::Formed:
      return "formed";
    case Tone::Caution:
      return "caution";
    case Tone::Good:
      return "good";
  }
  return "";
}

const char* spelled(Origin origin) {
  switch (origin) {
    case Origin::None:
      return "none";
    case Origin::Typed:
      return "typed";
    case Origin::Published:
      return "published";
    case Origin::Estimated:
      return "estimated";
    case Origin::Derived:
      return "derived";
  }
  return "";
}

const char* spelled(Align align) {
  switch (align) {
    case Align::Left:
      return "left";
    case Align::Right:
      return "right";
    case Align::Centre:
      return "centre";
  }
  return "";
}

const char* spelled(RowRole role) {
  switch (role) {
    case RowRole::Body:
      return "body";
    case RowRole::Detail:
      return "detail";
    case RowRole::Subtotal:
      return "subtotal";
    case RowRole::Result:
      return "result";
    case RowRole::Correction:
      return "correction";
  }
  return "";
}

const char* spelled(TableLook look) {
  switch (look) {
    case TableLook::Ledger:
      return "ledger";
    case TableLook::Form:
      return "form";
    case TableLook::Boxes:
      return "boxes";
    case TableLook::List:
      return "list";
    case TableLook::Banner:
      return "banner";
  }
  return "";
}

const char* spelled(Ink ink) {
  switch (ink) {
    case Ink::Axis:
      return "axis";
    case Ink::Grid:
      return "grid";
    case Ink::Text:
      return "text";
    case Ink::QuietText:
      return "quiet_text";
    case Ink::Broken:
      return "broken";
    case Ink::Formed:
      return "formed";
    case Ink::Typed:
      return "typed";
    case Ink::Plain:
      return "plain";
    case Ink::Accent:
      return "accent";
    case Ink::Band:
      return "band";
  }
  return "";
}

const char* spelled(NoteKind kind) {
  switch (kind) {
    case NoteKind::Info:
      return "info";
    case NoteKind::Assumption:
      return "assumption";
    case NoteKind::Caution:
      return "caution";
    case NoteKind::Disagreement:
      return "disagreement";
    case NoteKind::Error:
      return "error";
  }
  return "";
}

}  // namespace heatledger::page
