#include "io/results_folder.hpp"

#include <fmt/format.h>
#include <signal.h>
#include <unistd.h>

#include <algorithm>
#include <cerrno>
#include <exception>
#include <fstream>
#include <iterator>
#include <new>

#include "io/deferred_stop.hpp"

namespace barwall::io {
namespace {

namespace fs = std::filesystem;

const std::string temporary_prefix = ".barwall-unfinished-";

[[noreturn]] void fail(const fs::path& path, const std::string& what,
                       const std::error_code& error) {
  throw WriteError(fmt::format("{}: {}: {}", path.string(), what, error.message()));
}

/// Folders made on the way to a path, removed again unless kept.
class MadeFolders {
public:
  explicit MadeFolders(const fs::path& path) {
    std::vector<fs::path> missing;
    for (fs::path p = path; !p.empty() && !present(p); p = p.parent_path()) missing.push_back(p);
    for (auto p = missing.rbegin(); p != missing.rend(); ++p) {
      std::error_code error;
      fs::create_directory(*p, error);
      if (error) {
        remove();
        fail(*p, "cannot make the folder", error);
      }
      made_.push_back(*p);
    }
  }
  ~MadeFolders() {
    if (!kept_) remove();
  }
  MadeFolders(const MadeFolders&) = delete;
  MadeFolders& operator=(const MadeFolders&) = delete;
  void keep() { kept_ = true; }

private:
  void remove() {
    std::error_code ignored;  // a folder that someone else has filled meanwhile stays
    for (auto p = made_.rbegin(); p != made_.rend(); ++p) fs::remove(*p, ignored);
  }
  std::vector<fs::path> made_;
  bool kept_ = false;
};

/// Removes the temporary folders of runs that were killed while they wrote.
void remove_abandoned(const fs::path& parent) {
  std::error_code error;
  std::vector<fs::path> abandoned;
  for (const auto& entry : fs::directory_iterator(parent, error)) {
    const std::string name = entry.path().filename().string();
    if (name.rfind(temporary_prefix, 0) != 0) continue;
    const std::string id = name.substr(temporary_prefix.size());
    if (id.empty() || id.size() > 9 || id.find_first_not_of("0123456789") != std::string::npos) {
      continue;
    }
    const auto process = static_cast<pid_t>(std::stol(id));
    const bool runs = process != ::getpid() && (::kill(process, 0) == 0 || errno != ESRCH);
    if (!runs) abandoned.push_back(entry.path());
  }
  for (const fs::path& path : abandoned) fs::remove_all(path, error);
}

/// A temporary folder within the results folder, hence on the same disk; removed at the end.
class TemporaryFolder {
public:
  explicit TemporaryFolder(const fs::path& parent)
      : path_(parent / (temporary_prefix + std::to_string(::getpid()))) {
    remove_abandoned(parent);
    std::error_code error;
    fs::create_directory(path_, error);
    if (error) fail(parent, "cannot write into the folder", error);
  }
  ~TemporaryFolder() {
    std::error_code ignored;
    fs::remove_all(path_, ignored);
  }
  TemporaryFolder(const TemporaryFolder&) = delete;
  TemporaryFolder& operator=(const TemporaryFolder&) = delete;
  const fs::path& path() const { return path_; }

private:
  fs::path path_;
};

/// A text without a part of it, so that messages name the file as it would have been.
std::string without(std::string text, const std::string& part) {
  const std::size_t found = text.find(part);
  return found == std::string::npos ? text : text.erase(found, part.size());
}

/// Those of the names under which a folder holds something.
std::vector<std::string> names_in(const fs::path& folder, const std::vector<std::string>& names) {
  std::vector<std::string> found;
  std::copy_if(names.begin(), names.end(), std::back_inserter(found),
               [&](const std::string& name) { return present(folder / name); });
  return found;
}

void remove_files(const fs::path& folder, const std::vector<std::string>& names) {
  for (const std::string& name : names) {
    std::error_code error;
    fs::remove(folder / name, error);
    if (error) fail(folder / name, "cannot remove the earlier run's file", error);
  }
}

void move_files(const fs::path& from, const fs::path& to, const std::vector<std::string>& names) {
  for (const std::string& name : names) {
    std::error_code error;
    fs::rename(from / name, to / name, error);
    if (error) fail(to / name, "cannot move the file into place", error);
  }
}

}  // namespace

void fill_folder(const fs::path& folder, const Case& input, Contents contents, bool replace,
                 const std::vector<FileWriter>& writers) {
  check_folder(folder, input, contents, replace);
  const fs::path target = without_last_slash(fs::absolute(folder).lexically_normal());
  const Holding holding = look_into(target, input);
  DeferredStop stop;
  MadeFolders made(target);
  {
    const TemporaryFolder fresh(target);
    for (const FileWriter& write : writers) {
      try {
        write(fresh.path());
      } catch (const std::bad_alloc&) {
        throw;
      } catch (const std::exception& error) {
        throw WriteError(without(error.what(), "/" + fresh.path().filename().string()));
      }
      stop.check();
    }
    const auto written = names_in(fresh.path(), file_names(contents));
    std::vector<std::string> stale = names_in(target, file_names(contents));
    std::erase_if(stale, [&](const std::string& name) { return present(fresh.path() / name); });
    move_files(fresh.path(), target, written);
    remove_files(target, stale);
    if (holding.own_results && !holding.same_case) {
      const Contents other = contents == Contents::results ? Contents::drawing : Contents::results;
      remove_files(target, names_in(target, file_names(other)));
    }
  }
  made.keep();
}

void write_text(const fs::path& file, const std::string& text) {
  errno = 0;
  std::ofstream stream(file, std::ios::binary | std::ios::trunc);
  stream << text;
  stream.close();
  if (!stream) fail(file, "cannot be written whole", {errno, std::generic_category()});
}

}  // namespace barwall::io
