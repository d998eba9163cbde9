#include "reports/cli.hpp"

#include <sys/ioctl.h>
#include <unistd.h>

#include <cstdlib>
#include <ctime>
#include <iostream>
#include <nlohmann/json.hpp>

#include "params/locate.hpp"
#include "reports/case_reader.hpp"
#include "reports/check_task.hpp"
#include "reports/command_line.hpp"
#include "reports/html_report.hpp"
#include "reports/interrupt.hpp"
#include "reports/json_report.hpp"
#include "reports/name_task.hpp"
#include "reports/parallel.hpp"
#include "reports/run_case.hpp"
#include "reports/terminal.hpp"
#include "reports/vouch_task.hpp"
#include "reports/write_file.hpp"

namespace stillshed {
namespace {

constexpr int kBadInput = 2;
constexpr int kMismatch = 1;
constexpr int kOurFault = 70;

TerminalOptions terminal_options(const std::ostream& out) {
  TerminalOptions options;
  if (&out != &std::cout || isatty(STDOUT_FILENO) == 0) {
    return options;
  }
  const char* no_colour = std::getenv("NO_COLOR");
  options.colour = no_colour == nullptr || *no_colour == '\0';
  winsize size{};
  constexpr int kNarrowest = 60;
  constexpr int kWidest = 120;
  if (ioctl(STDOUT_FILENO, TIOCGWINSZ, &size) == 0 && size.ws_col >= kNarrowest) {
    options.width = std::min<int>(size.ws_col, kWidest);
  }
  return options;
}

std::string today() {
  const std::time_t now = std::time(nullptr);
  std::tm parts{};
  gmtime_r(&now, &parts);
  char text[16];
  return std::strftime(text, sizeof text, "%Y-%m-%d", &parts) > 0 ? text : "";
}

Case case_of(const Command& command, const Catalog& catalog) {
  Problems problems;
  SpokenWords spoken;
  const bool from_file = !command.words.empty();
  const std::string source = from_file ? command.words.front() : "command line";
  OrderedJson json = from_file ? parse_strict_json(read_file(source), source) : OrderedJson::object();
  if (!from_file || json.is_object()) {
    write_quick_form(command.form, json, spoken, problems);
    for (std::size_t k = 0; k < command.declared.size(); ++k) {
      json["declared"].push_back(command.declared[k]);
      spoken["/declared/" + std::to_string(json["declared"].size() - 1)] = "--declare " + command.declared[k];
    }
  }
  if (!problems.empty()) {
    throw InputError(problems);
  }
  return read_case(json, source, catalog, spoken);
}

/// Everything is computed and put into words before the first file is opened.
void write_results(const Command& command, const Answer& answer, std::ostream& out) {
  const bool json_to_out = command.json == "-";
  std::string json;
  if (!command.json.empty() || !command.out.empty()) {
    json = json_text(answer);
  }
  if (!command.out.empty()) {
    PageOptions page;
    page.date = today();
    const std::string html = html_text(answer, page);
    make_folder(command.out);
    write_file(command.out + "/result.json", json);
    write_file(command.out + "/report.html", html);
  }
  if (json_to_out) {
    out << json;
  } else if (!command.json.empty()) {
    write_file(command.json, json);
  }
  if (!json_to_out && !command.quiet) {
    const TerminalOptions options = terminal_options(out);
    out << (command.task == Task::vouch ? vouch_text(answer, options.width) : terminal_text(answer, options));
  }
}

int run_on_case(const Command& command, const Catalog& catalog, std::ostream& out, std::ostream& err) {
  const Case input = case_of(command, catalog);
  if (!command.out.empty()) {
    make_folder(command.out);
    expect_writable(command.out + "/result.json");
  }
  if (!command.json.empty() && command.json != "-") {
    expect_writable(command.json);
  }
  InterruptGuard guard;
  RunOptions options;
  options.seed = command.seed;
  options.stop = guard.token();
  options.progress = [&guard](const Progress&) { guard.poll(); };
  options.executor = parallel_executor();
  const Answer answer = run_case(input, catalog, command.task, options);
  write_results(command, answer, out);
  if (answer.exit_code == kInterruptedExit) {
    err << "stillshed: interrupted; what was found so far is marked as stopped\n";
  }
  return answer.exit_code;
}

/// Text for people unless the JSON goes to the same place.
void write_both(const Command& command, const std::string& text, const std::string& json, std::ostream& out) {
  if (command.json == "-") {
    out << json;
    return;
  }
  if (!command.json.empty()) {
    write_file(command.json, json);
  }
  if (!command.quiet) {
    out << text;
  }
}

int run_name(const Command& command, const Catalog& catalog, std::ostream& out) {
  const NameAnswer answer = name_text(command.words, catalog);
  if (!answer.problems.empty()) {
    if (command.json.empty() && !command.quiet) {
      out << answer.text;  // what was found may be what was wanted
    }
    throw InputError(answer.problems);
  }
  write_both(command, answer.text, answer.json, out);
  return 0;
}

int run_check(const Command& command, const Catalog& catalog, std::ostream& out) {
  const CheckAnswer answer = run_checks(catalog);
  write_both(command, check_text(answer, terminal_options(out).width), check_json(answer), out);
  return answer.mismatches() == 0 ? 0 : kMismatch;
}

int run_command(const std::vector<std::string>& words, std::ostream& out, std::ostream& err) {
  const Command command = read_command_line(words);
  if (!command.message.empty()) {
    out << command.message;
    return words.empty() ? kBadInput : 0;
  }
  const Catalog catalog(load_facts());
  switch (command.task) {
    case Task::name: return run_name(command, catalog, out);
    case Task::check: return run_check(command, catalog, out);
    default: return run_on_case(command, catalog, out, err);
  }
}

}  // namespace

int run_program(const std::vector<std::string>& words, std::ostream& out, std::ostream& err) {
  try {
    return run_command(words, out, err);
  } catch (const InputError& error) {
    const std::size_t count = error.problems().size();
    err << "stillshed: " << (count == 1 ? "a problem" : std::to_string(count) + " problems")
        << " with the input, nothing computed\n";
    for (const Problem& problem : error.problems()) {
      err << "  " << problem.text() << '\n';
    }
    return kBadInput;
  } catch (const std::exception& error) {
    err << "stillshed: our own fault, please report it with the input: " << error.what() << '\n';
    return kOurFault;
  }
}

}  // namespace stillshed
