// The texts of every record of a file: key and field, in canonical order. One list serves reading and
// writing. Not for callers outside this room.
#pragma once

#include <string>

#include "core/document/worksheet.hpp"

namespace heatledger::file {

template <typename T>
struct TextMember {
  const char* key;
  std::string T::*field;
};

inline constexpr TextMember<document::Header> kHeader[] = {
    {"title", &document::Header::title},
    {"subtitle", &document::Header::subtitle},
    {"sheet_number", &document::Header::sheet_number},
    {"revision", &document::Header::revision},
    {"prepared", &document::Header::prepared},
    {"prepared_date", &document::Header::prepared_date},
    {"checked", &document::Header::checked},
    {"checked_date", &document::Header::checked_date}};

inline constexpr TextMember<document::TypedHeat> kHeat[] = {{"value", &document::TypedHeat::value},
                                                            {"per", &document::TypedHeat::per},
                                                            {"at", &document::TypedHeat::at},
                                                            {"medium", &document::TypedHeat::medium},
                                                            {"includes", &document::TypedHeat::includes},
                                                            {"source", &document::TypedHeat::source},
                                                            {"from", &document::TypedHeat::from}};

/// Before the measured heat; the note stands behind it.
inline constexpr TextMember<document::ReactionSheet> kReaction[] = {
    {"id", &document::ReactionSheet::id},
    {"title", &document::ReactionSheet::title},
    {"equation", &document::ReactionSheet::equation},
    {"basis", &document::ReactionSheet::basis},
    {"bond_set", &document::ReactionSheet::bond_set},
    {"pinned_route", &document::ReactionSheet::pinned_route},
    {"reactants_at", &document::ReactionSheet::reactants_at},
    {"products_at", &document::ReactionSheet::products_at},
    {"pressure", &document::ReactionSheet::pressure}};

inline constexpr TextMember<document::TypedBond> kBond[] = {{"bond", &document::TypedBond::bond},
                                                            {"value", &document::TypedBond::value},
                                                            {"source", &document::TypedBond::source},
                                                            {"from", &document::TypedBond::from}};

inline constexpr TextMember<document::TypedFigure> kFigure[] = {{"species", &document::TypedFigure::species},
                                                                {"figure", &document::TypedFigure::figure},
                                                                {"value", &document::TypedFigure::value},
                                                                {"source", &document::TypedFigure::source},
                                                                {"from", &document::TypedFigure::from}};

inline constexpr TextMember<document::FeedRow> kFeedRow[] = {{"species", &document::FeedRow::species},
                                                             {"amount", &document::FeedRow::amount}};

inline constexpr TextMember<document::NamedQuantity> kQuantity[] = {
    {"name", &document::NamedQuantity::name},
    {"value", &document::NamedQuantity::value},
    {"unit", &document::NamedQuantity::unit},
    {"note", &document::NamedQuantity::note}};

inline constexpr TextMember<document::FeedSheet> kFeed[] = {
    {"name", &document::FeedSheet::name},   {"from", &document::FeedSheet::from},
    {"at", &document::FeedSheet::at},       {"pressure", &document::FeedSheet::pressure},
    {"total", &document::FeedSheet::total}, {"role", &document::FeedSheet::role}};

inline constexpr TextMember<document::ProgressSheet> kProgress[] = {
    {"reaction", &document::ProgressSheet::reaction},
    {"how", &document::ProgressSheet::how},
    {"figure", &document::ProgressSheet::figure},
    {"heat", &document::ProgressSheet::heat},
    {"heat_per", &document::ProgressSheet::heat_per},
    {"heat_at", &document::ProgressSheet::heat_at},
    {"includes", &document::ProgressSheet::includes},
    {"rate_constant", &document::ProgressSheet::rate_constant},
    {"rate_at", &document::ProgressSheet::rate_at},
    {"activation", &document::ProgressSheet::activation},
    {"orders", &document::ProgressSheet::orders}};

inline constexpr TextMember<document::ProfileRow> kProfile[] = {{"time", &document::ProfileRow::time},
                                                                {"amount", &document::ProfileRow::amount}};

inline constexpr TextMember<document::LeavingRow> kLeaving[] = {{"species", &document::LeavingRow::species},
                                                                {"how", &document::LeavingRow::how}};

inline constexpr TextMember<document::SpeciesRow> kSpecies[] = {
    {"species", &document::SpeciesRow::species},
    {"heat_capacity", &document::SpeciesRow::heat_capacity},
    {"density", &document::SpeciesRow::density},
    {"vapour_pressure", &document::SpeciesRow::vapour_pressure},
    {"molar_mass", &document::SpeciesRow::molar_mass}};

inline constexpr TextMember<document::StepSheet> kStep[] = {
    {"id", &document::StepSheet::id},       {"title", &document::StepSheet::title},
    {"kind", &document::StepSheet::kind},   {"sought", &document::StepSheet::sought},
    {"curve", &document::StepSheet::curve}, {"note", &document::StepSheet::note}};

}  // namespace heatledger::file
