#include "reports/parallel.hpp"

#include <tbb/parallel_for.h>

namespace stillshed {

Executor parallel_executor() {
  return [](std::size_t count, const std::function<void(std::size_t)>& body) {
    if (count < 2) {
      run_serially(count, body);
      return;
    }
    tbb::parallel_for(std::size_t{0}, count, body);
  };
}

}  // namespace stillshed
