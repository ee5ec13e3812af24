#include <cstdio>
#include <exception>
#include <string>

#include "apps/commands.hpp"
#include "core/error.hpp"

namespace {

// Says nothing rather than throw when standard error cannot be written.
void complain(const std::string& message) { std::fputs(("pilotis: " + message + "\n").c_str(), stderr); }

int shown(const pilotis::Error& error) {
  complain(error.what());
  return pilotis::exit_status_of(error);
}

}  // namespace

int main(int argc, char** argv) {
  int status = pilotis::all_hold;
  CLI::App app{"Pilotis: how a multi-story frame moves when the ground shakes, and what that means.", "pilotis"};
  app.set_version_flag("--version", "pilotis " PILOTIS_VERSION);
  app.require_subcommand(1);
  pilotis::add_check(app, status);
  pilotis::add_run(app, status);
  pilotis::add_modes(app, status);
  pilotis::add_motion(app, status);
  pilotis::add_synth(app, status);
  pilotis::add_fit(app, status);
  pilotis::add_verdict(app, status);
  pilotis::add_export(app, status);
  try {
    app.parse(argc, argv);
  } catch (const CLI::ParseError& e) {
    return app.exit(e) == 0 ? pilotis::all_hold : pilotis::wrong_input;
  } catch (const pilotis::Error& e) {
    return shown(e);
  } catch (const std::exception& e) {
    complain(e.what());
    return pilotis::outside_failed;
  }
  return status;
}
