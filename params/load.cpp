#include "params/load.hpp"

#include <algorithm>
#include <functional>
#include <utility>

#include "params/load_parts.hpp"
#include "params/sha256.hpp"

namespace stillshed {
namespace {

using Reader = std::function<void(const JsonNode&, Loading&)>;

/// One reader per entry of kParameterFiles.
std::array<Reader, kParameterFiles.size()> readers() {
  return {read_sources,
          [](const JsonNode& root, Loading& loading) { read_group_table(root, GroupModel::unifac, loading); },
          [](const JsonNode& root, Loading& loading) { read_group_table(root, GroupModel::dortmund, loading); },
          read_components,
          read_pressure_sets,
          read_names,
          read_cautions,
          read_residual_limits,
          read_check_values,
          read_measured_azeotropes};
}

}  // namespace

Facts load_parameter_folder(const std::filesystem::path& folder) {
  Loading loading;
  std::string all_text;
  const auto table = readers();
  for (std::size_t k = 0; k < kParameterFiles.size(); ++k) {
    const std::string file = kParameterFiles[k];
    const std::size_t problems_before = loading.problems.size();
    const std::string text = read_text_file(folder / file, &loading.problems);
    if (loading.problems.size() > problems_before) {
      continue;
    }
    // Name and length keep two sets of files with the same joined text apart.
    for (const std::string& part : {file, std::to_string(text.size()), text}) {
      all_text += part;
      all_text += '\n';
    }
    const JsonFile parsed(file, text, &loading.problems);
    if (const auto root = parsed.root()) {
      table[k](*root, loading);
    }
  }
  if (!loading.problems.empty()) {
    throw InputError(std::move(loading.problems));
  }
  loading.facts.sha256 = sha256_hex(all_text);
  return std::move(loading.facts);
}

void read_format(const JsonNode& root, const char* key) {
  constexpr int kFormat = 1;
  (void)root.integer(key, kFormat, kFormat);
}

void read_sources(const JsonNode& root, Loading& loading) {
  if (!root.allow({"stillshed_sources", "sources"})) {
    return;
  }
  read_format(root, "stillshed_sources");
  for (const JsonNode& node : root.items("sources")) {
    if (!node.allow({"key", "citation", "note"})) {
      continue;
    }
    Source source{node.text("key"), node.text("citation"), node.optional_text("note")};
    if (loading.facts.sources.contains(source.key)) {
      node.report("key", '"' + source.key + "\" a second time", "each key once", "merge the two sources");
      continue;
    }
    loading.facts.sources.emplace(source.key, std::move(source));
  }
}

std::string read_source(const JsonNode& node, const Loading& loading) {
  std::string key = node.text("source");
  if (!key.empty() && !loading.facts.sources.contains(key)) {
    node.report("source", '"' + key + '"', "a key of sources.json", "add the citation to sources.json");
  }
  return key;
}

void expect_components(const JsonNode& node, const char* key, const std::vector<std::string>& ids,
                       const Loading& loading) {
  for (const std::string& id : ids) {
    if (!loading.component_of_id.contains(id)) {
      node.report(key, '"' + id + '"', "an id of components.json", "check the spelling or add the component");
    }
  }
}

void expect_hazards(const JsonNode& node, const char* key, const std::vector<std::string>& flags) {
  static constexpr std::array<const char*, 21> kHazards = {"acid-catalysed-decomposition",
                                                           "acutely-toxic",
                                                           "autoxidizes",
                                                           "base-incompatible",
                                                           "cmr-1",
                                                           "cmr-2",
                                                           "corrosive",
                                                           "energetic-nitro",
                                                           "freezes-in-condenser",
                                                           "hcl-release",
                                                           "hcn-release",
                                                           "hydrolyses",
                                                           "low-autoignition",
                                                           "ozone-depleting",
                                                           "peroxide-former",
                                                           "persistent-fluorinated",
                                                           "polymerizes",
                                                           "slow-peroxide-former",
                                                           "stench",
                                                           "thermal-decomposition",
                                                           "water-reactive"};
  for (const std::string& flag : flags) {
    if (std::find(kHazards.begin(), kHazards.end(), flag) == kHazards.end()) {
      node.report(key, '"' + flag + '"', "a hazard flag listed in params/README.md");
    }
  }
}

}  // namespace stillshed
