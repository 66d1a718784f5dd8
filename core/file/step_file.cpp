#include "core/file/step_file.hpp"

#include "core/file/fields.hpp"
#include "core/file/writer.hpp"

namespace heatledger::file {
namespace {

using document::FeedSheet;
using document::StepSheet;

template <typename T, typename Write>
void add_list(Writer& out, const char* key, const std::vector<T>& list, Write write) {
  if (list.empty()) return;
  Json array = Json::array();
  for (const T& item : list) array.items().push_back(write(item));
  out.value(key, std::move(array));
}

template <typename T, std::size_t N>
void add_records(Writer& out, const char* key, const std::vector<T>& list,
                 const TextMember<T> (&members)[N]) {
  add_list(out, key, list, [&](const T& item) { return record_json(item, members); });
}

template <typename T, std::size_t N>
void read_records(Fields& fields, const char* key, std::vector<T>& list, const TextMember<T> (&members)[N],
                  std::vector<Error>& problems) {
  fields.objects(key, list, [&](const Json& item, const std::string& path) {
    return read_record(item, members, path, problems);
  });
}

Json feed_json(const FeedSheet& feed) {
  Writer out;
  out.texts(kFeed, feed);
  add_records(out, "rows", feed.rows, kFeedRow);
  return out.finish(feed.unknown);
}

FeedSheet read_feed(const Json& object, const std::string& path, std::vector<Error>& problems) {
  FeedSheet feed;
  Fields fields(object, path, problems);
  fields.texts(kFeed, feed);
  read_records(fields, "rows", feed.rows, kFeedRow, problems);
  feed.unknown = fields.rest();
  return feed;
}

}  // namespace

Json step_json(const StepSheet& step) {
  Writer out;
  out.texts(kStep, step);
  add_list(out, "feeds", step.feeds, feed_json);
  add_records(out, "reactions", step.reactions, kProgress);
  add_records(out, "leaving", step.leaving, kLeaving);
  add_records(out, "species", step.species, kSpecies);
  add_records(out, "profile", step.profile, kProfile);
  out.texts("blanks", step.blanks);
  out.flag("show_checker", step.show_checker);
  out.texts("checker", step.checker);
  return out.finish(step.unknown);
}

StepSheet read_step_sheet(const Json& object, const std::string& path, std::vector<Error>& problems) {
  StepSheet step;
  Fields fields(object, path, problems);
  fields.texts(kStep, step);
  fields.objects("feeds", step.feeds,
                 [&](const Json& feed, const std::string& at) { return read_feed(feed, at, problems); });
  read_records(fields, "reactions", step.reactions, kProgress, problems);
  read_records(fields, "leaving", step.leaving, kLeaving, problems);
  read_records(fields, "species", step.species, kSpecies, problems);
  read_records(fields, "profile", step.profile, kProfile, problems);
  fields.texts("blanks", step.blanks);
  fields.flag("show_checker", step.show_checker);
  fields.texts("checker", step.checker);
  step.unknown = fields.rest();
  return step;
}

}  // namespace heatledger::file
