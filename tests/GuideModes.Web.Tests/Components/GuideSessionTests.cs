using GuideModes.Web.Components.Pages.Guides;
using GuideModes.Web.Solving;
using Microsoft.Extensions.Logging.Abstractions;

namespace GuideModes.Web.Tests.Components;

public sealed class GuideSessionTests : IDisposable
{
    private readonly GuideSession _session = new(new SolveService(), NullLogger<GuideSession>.Instance);

    public void Dispose() => _session.Dispose();

    [Fact]
    public async Task Open_Guide_IsSolved()
    {
        await Settle(() => _session.Open(Samples.Document(Samples.Slab)));

        Assert.Equal(4, _session.Latest!.Answer.Modes.Length);
        Assert.False(_session.IsStale);
        Assert.False(_session.CanUndo);
    }

    [Fact]
    public async Task Edit_Fault_KeepsTheOldAnswerAndSaysItIsOld()
    {
        await Settle(() => _session.Open(Samples.Document(Samples.Slab)));

        _session.Edit(document => document.With("regions[0].thicknessUm", -3));

        Assert.Contains(_session.Faults, fault => fault.Path == "regions[0].thicknessUm");
        Assert.Equal(4, _session.Latest!.Answer.Modes.Length);
        Assert.True(_session.IsStale);
        Assert.False(_session.IsBusy);
    }

    [Fact]
    public async Task UndoRedo_Edits_WalkThroughTheDocuments()
    {
        var first = Samples.Document(Samples.Slab);
        await Settle(() => _session.Open(first));
        await Settle(() => _session.Edit(document => document.With("wavelengthUm", 1.2)));
        var second = _session.Document;

        await Settle(_session.Undo);
        Assert.Equal(first, _session.Document);
        Assert.Equal(first, _session.Latest!.Document);
        await Settle(_session.Redo);
        Assert.Equal(second, _session.Document);
        Assert.False(_session.CanRedo);

        await Settle(_session.Undo);
        await Settle(() => _session.Edit(document => document.With("wavelengthUm", 1.3)));
        Assert.False(_session.CanRedo);
    }

    [Fact]
    public async Task Edit_ManyInARow_EndsWithTheLast()
    {
        await Settle(() => _session.Open(Samples.Document(Samples.Slab)));

        await Settle(() =>
        {
            for (var i = 1; i <= 50; i++) _session.Edit(document => document.With("regions[0].thicknessUm", 4 + 0.01 * i));
        });

        Assert.False(_session.IsStale);
        Assert.Equal(4.5, _session.Latest!.Document.Number("regions[0].thicknessUm")!.Value, 12);
    }

    [Fact]
    public void Edit_ThatChangesNothing_LeavesNoTrace()
    {
        _session.Open(Samples.Document(Samples.Slab));
        _session.Edit(document => document.With("wavelengthUm", 1.0));
        var changed = _session.CanUndo;
        _session.Edit(document => document);

        Assert.Equal(changed, _session.CanUndo);
    }

    [Fact]
    public void Edit_OfAMisshapenDocument_IsRefusedWithASentence()
    {
        _session.Open(Samples.Document("""{"regions":[3]}"""));

        _session.Edit(document => document.With("regions[0].thicknessUm", 2));

        Assert.NotNull(_session.Trouble);
    }

    /// <summary>Does something, then waits for the session to have its answer; a minute is for a broken machine, not a measurement.</summary>
    private async Task Settle(Action action)
    {
        var settled = new TaskCompletionSource(TaskCreationOptions.RunContinuationsAsynchronously);
        void Look()
        {
            if (!_session.IsBusy) settled.TrySetResult();
        }

        action();
        _session.Changed += Look;
        Look();
        await settled.Task.WaitAsync(TimeSpan.FromMinutes(1));
        _session.Changed -= Look;
    }
}
