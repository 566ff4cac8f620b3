using MudBlazor;

namespace GuideModes.Web.Components.Layout;

/// <summary>The house colours and type for the component library; the same values stand in app.css as custom properties.</summary>
internal static class House
{
    private static readonly string[] Sans = ["Fira Sans", "Segoe UI", "system-ui", "sans-serif"];

    public static MudTheme Theme { get; } = new()
    {
        PaletteLight = new PaletteLight
        {
            Primary = "#0b4f6c",
            Secondary = "#9c4210",
            Background = "#f5f4ef",
            Surface = "#ffffff",
            TextPrimary = "#16202a",
            TextSecondary = "#4c5965",
            ActionDefault = "#3b4853",
            Success = "#1b6345",
            Warning = "#7c5200",
            Error = "#a3262b",
            LinesDefault = "#d3d5d2",
        },
        PaletteDark = new PaletteDark
        {
            Primary = "#7cc6e4",
            PrimaryContrastText = "#0d1318",
            Secondary = "#f0a36b",
            Background = "#10161b",
            Surface = "#182128",
            TextPrimary = "#e4e9ec",
            TextSecondary = "#a7b3bc",
            ActionDefault = "#c3ccd3",
            Success = "#7ed0a6",
            Warning = "#e6b85c",
            Error = "#ff9a96",
            LinesDefault = "#34414b",
        },
        Typography = new Typography
        {
            Default = new DefaultTypography { FontFamily = Sans, FontSize = "0.9375rem" },
            Button = new ButtonTypography { FontFamily = Sans, TextTransform = "none", FontWeight = "500", LetterSpacing = "0" },
        },
        LayoutProperties = new LayoutProperties { DefaultBorderRadius = "3px" },
    };
}
