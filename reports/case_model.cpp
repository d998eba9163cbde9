#include <functional>
#include <nlohmann/json.hpp>

#include "reports/case_parts.hpp"

namespace stillshed {
namespace {

/// Reads one model object; numbers stay at their defaults where something is wrong, and the problem is kept.
class ModelReader {
 public:
  ModelReader(CaseContext& context, std::string pointer, const OrderedJson& json,
              const std::vector<CaseComponent>& components)
      : context_(context), pointer_(std::move(pointer)), json_(json), components_(components) {}

  std::optional<ActivityModel> read();

 private:
  [[nodiscard]] int size() const { return static_cast<int>(components_.size()); }
  [[nodiscard]] std::string at(const std::string& key) const { return pointer_join(pointer_, key); }
  void keys(std::vector<std::string> allowed) {
    allowed.insert(allowed.begin(), "kind");
    read_object(context_, pointer_, json_, allowed);
  }
  /// n rows of n numbers; one number stands for every pair where `scalar` allows it. Absent and optional: zeros.
  Matrix<double> matrix(const std::string& key, bool required, bool scalar = false);
  Vec<double> row(const std::string& key, bool required);
  PairParameters pair_parameters(bool needs_one);
  int index(const std::string& pointer, const OrderedJson& json);
  RedlichKister redlich_kister();

  CaseContext& context_;
  std::string pointer_;
  const OrderedJson& json_;
  const std::vector<CaseComponent>& components_;
};

Matrix<double> ModelReader::matrix(const std::string& key, bool required, bool scalar) {
  Matrix<double> result(size(), 0.0);
  const std::string shape =
      std::to_string(size()) + " rows of " + std::to_string(size()) + " numbers, in the order of \"components\"";
  if (!json_.contains(key)) {
    if (required) {
      context_.refuse(at(key), "nothing", shape);
    }
    return result;
  }
  const OrderedJson& given = json_.at(key);
  if (scalar && given.is_number()) {
    const double value = read_finite(context_, at(key), given).value_or(0.0);
    for (int i = 0; i < size(); ++i) {
      for (int j = 0; j < size(); ++j) {
        result(i, j) = i == j ? 0.0 : value;
      }
    }
    return result;
  }
  if (!given.is_array() || given.size() != components_.size()) {
    context_.refuse(at(key), given.is_array() ? std::to_string(given.size()) + " rows" : brief_json(given), shape);
    return result;
  }
  for (int i = 0; i < size(); ++i) {
    const OrderedJson& line = given[static_cast<std::size_t>(i)];
    const std::string line_pointer = pointer_join(at(key), std::to_string(i));
    if (!line.is_array() || line.size() != components_.size()) {
      context_.refuse(line_pointer, line.is_array() ? std::to_string(line.size()) + " numbers" : brief_json(line),
                      shape);
      continue;
    }
    for (int j = 0; j < size(); ++j) {
      result(i, j) =
          read_finite(context_, pointer_join(line_pointer, std::to_string(j)), line[static_cast<std::size_t>(j)])
              .value_or(0.0);
    }
  }
  return result;
}

Vec<double> ModelReader::row(const std::string& key, bool required) {
  Vec<double> result;
  if (!json_.contains(key)) {
    if (required) {
      context_.refuse(at(key), "nothing", std::to_string(size()) + " numbers, in the order of \"components\"");
    }
    return result;
  }
  const OrderedJson& given = json_.at(key);
  if (!given.is_array() || given.size() != components_.size()) {
    context_.refuse(at(key), brief_json(given), std::to_string(size()) + " numbers, in the order of \"components\"");
    return result;
  }
  for (std::size_t i = 0; i < given.size(); ++i) {
    result.push_back(read_positive(context_, pointer_join(at(key), std::to_string(i)), given[i]).value_or(1.0));
  }
  return result;
}

PairParameters ModelReader::pair_parameters(bool needs_one) {
  PairParameters result(size());
  const bool any = json_.contains("a") || json_.contains("b_K") || json_.contains("e") || json_.contains("f");
  if (needs_one && !any) {
    context_.refuse(pointer_, "no pair parameters", "at least one of a, b_K, e, f");
  }
  result.a = matrix("a", false);
  result.b_K = matrix("b_K", false);
  result.e = matrix("e", false);
  result.f_per_K = matrix("f", false);
  return result;
}

int ModelReader::index(const std::string& pointer, const OrderedJson& json) {
  if (json.is_string()) {
    return find_component(context_, pointer, json.get<std::string>(), components_).value_or(-1);
  }
  return read_whole(context_, pointer, json, 0, size() - 1).value_or(-1);
}

RedlichKister ModelReader::redlich_kister() {
  keys({"pairs"});
  if (!json_.contains("pairs") || !json_.at("pairs").is_array()) {
    context_.refuse(at("pairs"), json_.contains("pairs") ? brief_json(json_.at("pairs")) : "nothing",
                    R"(an array such as [{"i": 0, "j": 1, "c": [1.2, 0.1]}])");
    return RedlichKister(size(), {});
  }
  const OrderedJson& given = json_.at("pairs");
  std::vector<RedlichKisterPair> pairs;
  const std::size_t before = context_.problems.size();
  for (std::size_t k = 0; k < given.size(); ++k) {
    const std::string where = pointer_join(at("pairs"), std::to_string(k));
    if (!read_object(context_, where, given[k], {"i", "j", "c"})) {
      continue;
    }
    RedlichKisterPair pair;
    for (const char* key : {"i", "j", "c"}) {
      if (!given[k].contains(key)) {
        context_.refuse(pointer_join(where, key), "nothing", "a pair needs i, j and c");
      }
    }
    if (given[k].contains("i") && given[k].contains("j")) {
      pair.i = index(pointer_join(where, "i"), given[k].at("i"));
      pair.j = index(pointer_join(where, "j"), given[k].at("j"));
    }
    if (given[k].contains("c")) {
      if (!given[k].at("c").is_array()) {
        context_.refuse(pointer_join(where, "c"), brief_json(given[k].at("c")), "an array of numbers");
      } else {
        for (std::size_t m = 0; m < given[k].at("c").size(); ++m) {
          const std::string entry = pointer_join(pointer_join(where, "c"), std::to_string(m));
          pair.c.push_back(read_finite(context_, entry, given[k].at("c")[m]).value_or(0.0));
        }
      }
    }
    pairs.push_back(std::move(pair));
  }
  return context_.problems.size() == before ? RedlichKister(size(), std::move(pairs)) : RedlichKister(size(), {});
}

std::optional<ActivityModel> ModelReader::read() {
  static const std::string kKinds = "margules, redlich-kister, nrtl, wilson, uniquac";
  if (!json_.contains("kind") || !json_.at("kind").is_string()) {
    context_.refuse(at("kind"), json_.contains("kind") ? brief_json(json_.at("kind")) : "nothing", kKinds);
    return std::nullopt;
  }
  const std::string kind = json_.at("kind").get<std::string>();
  const std::size_t before = context_.problems.size();
  const auto unless_wrong = [&](const std::function<ActivityModel()>& build) -> std::optional<ActivityModel> {
    return context_.problems.size() == before ? std::optional<ActivityModel>(build()) : std::nullopt;
  };
  if (kind == "margules") {
    keys({"A"});
    const Matrix<double> A = matrix("A", true);
    return unless_wrong([&] { return Margules(A); });
  }
  if (kind == "redlich-kister") {
    const RedlichKister model = redlich_kister();
    return unless_wrong([&] { return model; });
  }
  if (kind == "nrtl") {
    keys({"a", "b_K", "e", "f", "alpha", "d"});
    NrtlParameters parameters(size());
    parameters.tau = pair_parameters(true);
    parameters.alpha = matrix("alpha", true, true);
    parameters.alpha_per_K = matrix("d", false, true);
    return unless_wrong([&] { return Nrtl(parameters); });
  }
  if (kind == "wilson") {
    keys({"a", "b_K", "e", "f"});
    const PairParameters parameters = pair_parameters(true);
    return unless_wrong([&] { return Wilson(parameters); });
  }
  if (kind == "uniquac") {
    keys({"r", "q", "q_residual", "a", "b_K", "e", "f"});
    UniquacParameters parameters;
    parameters.r = row("r", true);
    parameters.q = row("q", true);
    parameters.q_residual = row("q_residual", false);
    parameters.ln_tau = pair_parameters(true);
    return unless_wrong([&] { return Uniquac(parameters); });
  }
  const std::string near = nearest_word(kind, {"margules", "redlich-kister", "nrtl", "wilson", "uniquac"});
  context_.refuse(at("kind"), in_quotes(kind), kKinds, near.empty() ? "" : "did you mean " + in_quotes(near) + "?");
  return std::nullopt;
}

}  // namespace

std::optional<ActivityModel> read_model(CaseContext& context, const std::string& pointer, const OrderedJson& json,
                                        const std::vector<CaseComponent>& components) {
  try {
    return ModelReader(context, pointer, json, components).read();
  } catch (const InputError& error) {  // shapes were right, numbers were not
    for (const Problem& problem : error.problems()) {
      const std::size_t slash = problem.where.find('/');
      context.refuse(slash == std::string::npos ? pointer : pointer + problem.where.substr(slash), problem.found,
                     problem.allowed, problem.remedy);
    }
    return std::nullopt;
  }
}

}  // namespace stillshed
