#include <iostream>

#include "reports/cli.hpp"

int main(int count, char** words) {
  std::ios::sync_with_stdio(false);
  return stillshed::run_program(std::vector<std::string>(words + 1, words + count), std::cout, std::cerr);
}
